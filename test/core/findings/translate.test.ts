import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { type Finding, finding } from '../../../core/findings/finding';
import { type FindingCode, sentences } from '../../../core/findings/sentences';
import { translatedLine, translatedPlace, translatedText } from '../../../core/findings/translate';
import { translatedPhrase } from '../../../core/findings/translatePhrase';
import { findingView } from '../../../core/view/findingView';

const file = join(__dirname, '../../../media/l10n/bundle.l10n.de.json');
const german: Record<string, string> = JSON.parse(readFileSync(file, 'utf8'));
const view = (found: Finding) => findingView(found, null);
const said = (text: string) => translatedPhrase(text, german);

describe('a finding', () => {
  const stuck = view(
    finding(
      'stuck',
      { times: '2 times', samples: 120, longest: 80, positions: 'samples 100 and 400', value: 0.5 },
      { file: 'slow.csv', channel: 'before', from: 100, to: 180 },
    ),
  );

  it('is English where there is no dictionary', () => {
    expect(translatedText(stuck, {})).toBe(stuck.text);
    expect(translatedPlace(stuck, {})).toBe('slow.csv, channel before, samples 100 to 180');
  });

  it('is in the language of the dictionary, with its values and its place', () => {
    expect(translatedLine(stuck, german)).toBe(
      'slow.csv, Kanal before, Abtastwerte 100 bis 180: das Signal steht 2-mal still, insgesamt 120 Abtastwerte und höchstens 80 am Stück, ab den Abtastwerten 100 und 400, zuerst auf genau 0.5; erwartet: eine Änderung mit jedem Abtastwert, wie davor und danach. Sensor und Datenlogger prüfen und diese Abschnitte aus den Intervallen lassen.',
    );
  });

  it('keeps names as they are, whatever they say', () => {
    const same = view(finding('identical-channels', { other: 'nothing was held out' }));
    expect(translatedText(same, german)).toContain('in Kanal nothing was held out;');
  });

  it('keeps braces and what cannot be seen in names harmless', () => {
    const odd = view(finding('channel-missing', { channel: '{known}\u202e', count: 2, known: 'a' }));
    expect(translatedText(odd, german)).toContain('Kanal "{known}\\u202e"; erwartet: einer von 2: a');
  });

  it('that the host has put in words already stays', () => {
    expect(translatedText({ text: 'Nicht gespeichert.', place: '' }, german)).toBe('Nicht gespeichert.');
  });

  it('has a German sentence for every code, and none is left half filled', () => {
    for (const code of Object.keys(sentences) as FindingCode[]) {
      const names = [...sentences[code].says.matchAll(/\{(\w+)\}/g)].map((match) => match[1]);
      const found = view(finding(code, Object.fromEntries(names.map((name) => [name, 7]))));
      const text = translatedText(found, german);
      expect(text, code).not.toBe(found.text);
      expect(text, code).not.toMatch(/[{}]/);
    }
  });
});

describe('a phrase', () => {
  it('is known by what stands around its figures', () => {
    expect(said('3 times')).toBe('3-mal');
    expect(said('It is no less than 12.5 dB. ')).toBe('Es sind nicht weniger als 12.5 dB. ');
    expect(said('belt.csv, channel cell')).toBe('belt.csv, Kanal cell');
  });

  it('has phrases and lists in it', () => {
    expect(
      said(
        'To rule it out take an accumulator of 36 bits, at most 11 fraction bits or inputs shifted right by 4 (input.word 12 at the same full scale).',
      ),
    ).toBe(
      'Ausgeschlossen wird es durch einen Akkumulator mit 36 Bits, höchstens 11 Nachkommabits oder um 4 nach rechts geschobene Eingänge (input.word 12 bei derselben Vollaussteuerung).',
    );
    expect(said('0 Hz to 5 Hz, 100 Hz to 150 Hz and 2 more')).toBe(
      '0 Hz bis 5 Hz, 100 Hz bis 150 Hz und 2 weitere',
    );
  });

  it('that is not known stays as it is, also where words of it are', () => {
    expect(said('a sentence that core does not have')).toBe('a sentence that core does not have');
    expect(said('salt and pepper')).toBe('salt and pepper');
    expect(said('')).toBe('');
  });

  it('is English without a dictionary', () => {
    expect(translatedPhrase('3 times', {})).toBe('3 times');
  });

  it('is found fast in a text made to be slow', () => {
    const begun = performance.now();
    said(`${'a to b, or c and d of e in f '.repeat(200)}!`);
    expect(performance.now() - begun).toBeLessThan(1000);
  });
});
