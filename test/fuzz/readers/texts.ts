import { documentMeaning } from '../../../core/document/canonicalJson';
import { readDocument } from '../../../core/document/readDocument';
import { readMark } from '../../../core/files/generatedMark';
import { readTaps } from '../../../core/files/readTaps';
import { blocked } from '../../../core/findings/finding';
import type { FuzzInput } from '../makeInput';
import { checkFindings, refusalFindings } from './checkFindings';

/** Findings of one document at most, and one that says how many more there are. */
const mostFindings = 101;

/** As much of a file as the hosts look for a mark in. */
const markBytes = 4096;

/** Reads a pairing document and locates every finding; `read` where there is a document. */
export async function readPairing({ bytes }: FuzzInput): Promise<string[]> {
  const text = new TextDecoder('utf-8', { ignoreBOM: true }).decode(bytes);
  const { document, findings } = readDocument(text);
  checkFindings(findings, bytes, text);
  if (findings.length > mostFindings) throw new Error(`${findings.length} findings`);
  if ((document === null) !== blocked(findings)) throw new Error('a blocker and a document, or neither');
  const codes = findings.map(({ code }) => code as string);
  if (document === null) return codes;
  if (documentMeaning(document) !== documentMeaning(readDocument(text).document!))
    throw new Error('read in two ways');
  return [...codes, 'read'];
}

/** Reads a taps file; `read` where it is one. */
export async function readTapsFile({ bytes }: FuzzInput): Promise<string[]> {
  try {
    const { inputs, coefficients, arithmetic, files } = readTaps(
      new TextDecoder().decode(bytes),
      'x.taps.json',
    );
    const rows = [coefficients.length, arithmetic.values.length];
    if (rows.some((count) => count !== inputs.length)) throw new Error(`rows: ${rows}`);
    if (Object.values(files).some((digest) => typeof digest !== 'string'))
      throw new Error('a digest that is no text');
    return ['read'];
  } catch (error) {
    const refused = refusalFindings(error);
    checkFindings(refused, bytes, null);
    const codes = refused.map(({ code }) => code);
    if (codes.join() !== 'not-taps') throw error;
    return codes;
  }
}

/** Looks for a mark in the start of a file, as hosts do, and in all of it. */
export async function readMarked({ bytes }: FuzzInput): Promise<string[]> {
  const texts = [
    new TextDecoder('latin1').decode(bytes.subarray(0, markBytes)),
    new TextDecoder().decode(bytes),
  ];
  return texts.map((text) => {
    const mark = readMark(text);
    if (mark === null) return 'no mark';
    if (mark.document === '' || !/^[0-9a-f]{64}$/.test(mark.digest)) throw new Error(JSON.stringify(mark));
    return 'mark';
  });
}
