import { languages } from '../../core/document/pairingDocument';
import { longestSymbol, symbolFault } from '../../core/document/symbol';
import type { PageContext } from '../context';
import { newCheckField, newChoiceField, newGroup } from '../form/choiceField';
import type { Field } from '../form/fieldBook';
import { newNumberField } from '../form/numberField';
import { newTextField } from '../form/textField';
import { t } from '../words';

/** What is written, where, and what it may not exceed. */
export function writeFields({ edit, fields, state }: PageContext): Field[] {
  const languageName = {
    c: t('C header'),
    'c-source': t('C filter function'),
    rs: t('Rust'),
    csv: t('CSV'),
    npy: t('NPY'),
  };
  const chosen = () => state().form?.document.write.languages ?? [];
  const boxes = languages.map((language) =>
    newCheckField(
      {
        path: ['write', 'languages', language],
        label: languageName[language],
        help: t('Written beside the full result and the design note.'),
        read: (form) => form.document.write.languages.includes(language),
        changes: (on) => [
          {
            path: ['write', 'languages'],
            value: languages.filter((one) => (one === language ? on : chosen().includes(one))),
          },
        ],
      },
      edit,
    ),
  );
  const group = newGroup(['write', 'languages'], t('Languages'), ...boxes.map(({ element }) => element));
  const list: Field[] = [
    newChoiceField(
      {
        path: ['write', 'order'],
        label: t('Order of the taps'),
        help: t('In which order the arrays hold the coefficients.'),
        choices: [
          { value: 'newest-first', label: t('newest first') },
          { value: 'oldest-first', label: t('oldest first') },
        ],
      },
      edit,
    ),
    textField('symbol', t('Symbol'), t('C identifier that the written names start with.'), checkSymbol),
    textField(
      'folder',
      t('Folder'),
      t('Folder of the written files, from the document; . is its own.'),
      (text) =>
        text.trim() === ''
          ? { error: t('Nothing is given when a folder is expected.') }
          : { value: text.trim() },
    ),
    newNumberField(
      {
        path: ['write', 'testVectors'],
        label: t('Test vectors'),
        unit: t('samples'),
        help: t('Input samples and the bit-exact output, for a unit test of the firmware; 0: none.'),
        rule: { min: 0, max: 65_536, whole: true },
      },
      edit,
    ),
    limitField(
      'heldOutNmse',
      t('Limit of the held-out NMSE'),
      t('A check fails where the held-out NMSE is above it.'),
    ),
    limitField(
      'quantisationLoss',
      t('Limit of the quantisation loss'),
      t('A check fails where the integers cost more than this.'),
    ),
  ];
  for (const field of [...boxes, group, ...list]) fields.add(field);
  return [group, ...list];

  function textField(
    key: 'symbol' | 'folder',
    label: string,
    help: string,
    check: (text: string) => { value: string } | { error: string },
  ): Field {
    const path = ['write', key];
    return newTextField(
      {
        path,
        label,
        help,
        read: (form) => form.document.write[key],
        show: (value) => value,
        check,
        changes: (value) => [{ path, value }],
      },
      edit,
    );
  }

  function limitField(key: string, label: string, help: string): Field {
    const rule = { min: -1e12, max: 1e12, optional: true };
    return newNumberField(
      { path: ['limits', key], label, unit: t('dB'), help, empty: t('no limit'), rule },
      edit,
    );
  }
}

function checkSymbol(text: string): { value: string } | { error: string } {
  const name = text.trim();
  const fault = symbolFault(name);
  if (fault === null) return { value: name };
  const says = {
    form: t('Got {0} when letters A to Z, digits and underscores are expected, the first no digit.', name),
    long: t('Got {0} characters when at most {1} are expected.', name.length, longestSymbol),
    keyword: t('{0} is a keyword of C or C++.', name),
    reserved: t('{0} is a name that C and C++ keep for the compiler.', name),
  };
  return { error: says[fault] };
}
