import { benchFile } from './benchFiles';
import { type Seed, textSeed } from './seed';

const everyKey = `{
  "$schema": "./pairing.schema.json",
  "pairing": 1,
  "title": "Every key",
  "job": "identify",
  "sampleRate": 2000,
  "takes": [
    {
      "name": "first",
      "inputs": [{ "file": "a/slow.csv", "channel": "frame_x" }, { "file": "slow.wav", "channel": 2 }],
      "desired": { "file": "slow.csv", "channel": "cell" },
      "fit": [{ "from": 0, "to": 40 }, { "from": 45, "to": 50.5 }],
      "heldOut": { "from": 120000, "to": 130000, "unit": "samples" },
      "disturbanceOnly": []
    }
  ],
  "prepare": { "removeMean": false, "band": { "from": 10, "to": 900 } },
  "filter": {
    "length": 33, "delay": 16, "regularisation": 1e-4, "windowing": "autocorrelation", "symmetry": "even",
    "fixedGain": { "input": 1, "frequency": 50, "gain": 1 }
  },
  "arithmetic": {
    "word": 16, "fractionBits": 14, "rounding": "error-aware", "accumulator": 40, "accumulatorOverflow": "wrap",
    "overflow": "saturate", "cyclesPerMac": 2,
    "input": { "word": 16, "fullScale": [4.0, 2] },
    "output": { "word": 12, "fullScale": 64.0 }
  },
  "write": {
    "folder": "generated/fir", "symbol": "belt", "languages": ["c", "c-source", "rs", "csv", "npy"],
    "order": "oldest-first", "testVectors": 256,
    "attributes": { "cBefore": "static", "cAfter": "", "rust": "#[link_section = \\".taps\\"]" }
  },
  "limits": { "heldOutNmse": -20, "quantisationLoss": 0.1 }
}
`;

const least = `{"pairing":1,"job":"cancel","takes":[{"inputs":[{"file":"x.wav","channel":1}],
"desired":{"file":"x.wav","channel":2}}]}`;

/** Pairing documents: the sample bench's, one with every key, one with the fewest. */
export function documentSeeds(): Seed[] {
  return [
    ...['belt', 'tubing', 'valve'].map((name) => ({
      name: `${name}.pairing.json`,
      bytes: benchFile(`${name}.pairing.json`),
    })),
    textSeed('every key', everyKey),
    textSeed('fewest keys', least),
  ];
}
