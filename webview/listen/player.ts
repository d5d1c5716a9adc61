/** Plays sound at a gain that can be changed while it plays. An `<audio>` element is beyond what the page may load. */
export interface Player {
  play(samples: Float32Array<ArrayBuffer>, sampleRate: number, ended: () => void): void;
  stop(): void;
  setGain(gain: number): void;
}

export function newPlayer(startGain: number): Player {
  let audio: { context: AudioContext; gain: GainNode } | null = null;
  let source: AudioBufferSourceNode | null = null;
  let gain = startGain;

  const stop = () => {
    const playing = source;
    source = null;
    playing?.stop();
  };
  return {
    play(samples, sampleRate, ended) {
      stop();
      if (audio === null) {
        const context = new AudioContext();
        const node = context.createGain();
        node.connect(context.destination);
        audio = { context, gain: node };
      }
      const { context, gain: node } = audio;
      void context.resume();
      const buffer = context.createBuffer(1, Math.max(1, samples.length), sampleRate);
      buffer.copyToChannel(samples, 0);
      const next = context.createBufferSource();
      next.buffer = buffer;
      next.connect(node);
      next.onended = () => {
        // One that gave way to another or was stopped says nothing: it ends after the next has begun.
        if (source !== next) return;
        source = null;
        ended();
      };
      // From silence up, so that nothing begins with a jump.
      node.gain.cancelScheduledValues(context.currentTime);
      node.gain.setValueAtTime(0, context.currentTime);
      node.gain.linearRampToValueAtTime(gain, context.currentTime + 0.05);
      source = next;
      next.start();
    },
    stop,
    setGain(next) {
      gain = next;
      if (audio !== null) audio.gain.gain.setTargetAtTime(gain, audio.context.currentTime, 0.02);
    },
  };
}
