console.log('tapwright');
