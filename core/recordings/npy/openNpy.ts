import type { ByteSource } from '../../bytes/byteSource';
import { grouped } from '../../figures/numbers';
import { type Finding, finding } from '../../findings/finding';
import { framedReader } from '../framedReader';
import { openSafely } from '../openSafely';
import type { Opened, Recording } from '../recording';
import { type Dtype, dtypeOf } from './dtype';
import { type NpyHeader, readHeader } from './header';

const mostChannels = 1024;

/** How samples and channels lie in the file. */
interface Layout {
  samples: number;
  channels: number;
  /** True where the samples of one instant stand together; false where those of one channel do. */
  interleaved: boolean;
  words: string;
}

/**
 * Opens an NPY file (NumPy Enhancement Proposal 1) of one or two axes. Of two axes the longer one is time; where both are
 * equal the rows are samples. The file has no sample rate; whole numbers keep their own unit.
 */
export function openNpy(source: ByteSource, file: string): Promise<Opened> {
  return openSafely(source, file, (whole) => open(whole, file));
}

async function open(source: ByteSource, file: string): Promise<Opened> {
  const refused = (found: Finding): Opened => ({ recording: null, findings: [found] });
  const header = await readHeader(source, file);
  if ('code' in header) return refused(header);
  const dtype = dtypeOf(header.dtype);
  if (dtype === null) {
    const type = header.dtype.length > 40 ? `${header.dtype.slice(0, 40)}…` : header.dtype;
    return refused(finding('unsupported-dtype', { what: `elements of type "${type}"` }, { file }));
  }
  const layout = layoutOf(header);
  if (layout.channels < 1 || layout.channels > mostChannels) {
    const values = { what: `${layout.channels} channels`, expected: `1 to ${mostChannels}` };
    return refused(finding('unreadable-header', values, { file }));
  }
  const findings: Finding[] = [];
  const samples = samplesThere(source, header, dtype, layout, file, findings);
  if (samples < 2)
    return { recording: null, findings: [...findings, finding('too-short', { samples }, { file })] };
  const recording: Recording = {
    file,
    format: `NPY, ${dtype.name}, ${layout.words}`,
    pcm: false,
    lineEndsIgnored: false,
    sampleRate: null,
    samples,
    channels: new Array(layout.channels).fill(null),
    read: layout.interleaved
      ? framedReader(source, file, header.dataFrom, dtype.bytes * layout.channels, dtype.bytes, dtype.decode)
      : planarReader(source, file, header.dataFrom, layout.samples, dtype),
  };
  return { recording, findings };
}

function layoutOf({ shape, fortran }: NpyHeader): Layout {
  if (shape.length === 1)
    return { samples: shape[0], channels: 1, interleaved: true, words: `${grouped(shape[0])} values` };
  const [rows, columns] = shape;
  const rowsAreTime = rows >= columns;
  return {
    samples: rowsAreTime ? rows : columns,
    channels: rowsAreTime ? columns : rows,
    interleaved: rowsAreTime !== fortran,
    words: `${grouped(rows)} × ${grouped(columns)}, ${rowsAreTime ? 'rows' : 'columns'} are samples`,
  };
}

/** Interleaved samples can be cut short; where whole channels follow one another, what is missing is a channel. */
function samplesThere(
  source: ByteSource,
  header: NpyHeader,
  dtype: Dtype,
  { samples, channels, interleaved }: Layout,
  file: string,
  findings: Finding[],
): number {
  const there = source.size - header.dataFrom;
  const declared = samples * channels * dtype.bytes;
  if (declared <= there) return samples;
  if (!interleaved && channels > 1) {
    const values = { what: `${there} bytes of samples`, expected: `${declared}, as the shape says` };
    findings.push(finding('unreadable-header', values, { file }));
    return 0;
  }
  findings.push(finding('truncated', { declared, there }, { file }));
  return Math.floor(there / (channels * dtype.bytes));
}

function planarReader(
  source: ByteSource,
  file: string,
  start: number,
  samples: number,
  { bytes, decode }: Dtype,
): Recording['read'] {
  return async (channels, from, to, into) => {
    const planes: Float64Array[] = [];
    for (const [c, channel] of channels.entries()) {
      const read = framedReader(source, file, start + channel * samples * bytes, bytes, bytes, decode);
      planes.push(...(await read([0], from, to, into && [into[c]])));
    }
    return planes;
  };
}
