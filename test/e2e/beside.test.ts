import { describe } from 'vitest';
import { besideFlows } from './flows/beside';
import { flows } from './support/flows';
import { workbenchIsHere } from './support/programs';

describe.skipIf(!workbenchIsHere())('beside the code, in a real workbench', () => {
  besideFlows(flows());
});
