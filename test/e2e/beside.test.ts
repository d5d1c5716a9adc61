import { describe } from 'vitest';
import { besideFlows } from './flows/beside';
import { flows } from './support/flows';
import { workbenchIsHere } from './support/programs';

describe.skipIf(!workbenchIsHere())('beside the code, in a real workbench', () => {
  // Drawn as text, a terminal can be read.
  besideFlows(flows({ settings: { 'terminal.integrated.gpuAcceleration': 'off' } }));
});
