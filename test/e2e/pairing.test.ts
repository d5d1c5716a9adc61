import { describe } from 'vitest';
import { appearanceFlows } from './flows/appearance';
import { documentFlows } from './flows/document';
import { formFlows } from './flows/form';
import { keyboardFlows } from './flows/keyboard';
import { recordingFlows } from './flows/recordings';
import { resultFlows } from './flows/result';
import { walkthroughFlows } from './flows/walkthrough';
import { writingFlows } from './flows/writing';
import { flows } from './support/flows';
import { workbenchIsHere } from './support/programs';

// One workbench for all of them: starting one takes longer than most flows.
describe.skipIf(!workbenchIsHere())('in a real workbench', () => {
  const flow = flows();
  walkthroughFlows(flow);
  formFlows(flow);
  documentFlows(flow);
  writingFlows(flow);
  resultFlows(flow);
  recordingFlows(flow);
  keyboardFlows(flow);
  appearanceFlows(flow);
});
