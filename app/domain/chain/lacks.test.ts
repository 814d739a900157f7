import { describe, expect, test } from 'vitest';
import {
  type CaseRecord,
  caseState,
  evidenceChain,
  lackingForCause,
  lackingForCure,
  provedTight,
} from './chain.ts';

const FINDING = {
  componentId: 'condenser',
  failureModeId: 'cracked',
  causeId: 'routing',
  certainty: 'confirmed' as const,
};
const WHOLE: CaseRecord = {
  medium: 'refrigerant',
  complaint: 'Blows warm uphill',
  symptomCount: 1,
  hoursKnown: true,
  weatherKnown: true,
  readings: [{ kind: 'standing-pressure' }, { kind: 'ambient-temperature' }],
  methods: [{ outcome: 'found' }],
  findings: [FINDING],
  tracePhotos: 1,
  repairs: [{ at: 10 }],
  proofs: [{ verdict: 'tight', at: 20 }],
  charges: [{ kind: 'charged', at: 30 }],
  notes: { readings: '', trace: '', repair: '', proof: '', charge: '' },
  writeUpState: 'published',
  backToWork: true,
  parked: false,
  closedUnsolved: false,
};
const NOTES = WHOLE.notes;
const linkOf = (change: Partial<CaseRecord>, key: string) => {
  const found = evidenceChain({ ...WHOLE, ...change }).find((link) => link.key === key);
  return [found?.state, found?.lacks];
};

test('the whole record lacks nothing', () => {
  for (const { state, lacks } of evidenceChain(WHOLE)) expect([state, lacks]).toEqual(['done', []]);
});

describe('what a link lacks, and whether it was begun', () => {
  test.each<[string, string, Partial<CaseRecord>, unknown]>([
    ['complaint', 'no words', { complaint: ' ' }, ['partly', ['what the operator said']]],
    ['complaint', 'no symptom', { symptomCount: 0 }, ['partly', ['symptoms']]],
    ['complaint', 'no weather', { weatherKnown: false }, ['partly', ['the weather']]],
    ['complaint', 'no hours', { hoursKnown: false }, ['partly', ['the machine’s hours']]],
    [
      'complaint',
      'neither words nor symptom',
      { complaint: '  ', symptomCount: 0 },
      ['missing', ['what the operator said', 'symptoms']],
    ],
    ['readings', 'none', { readings: [] }, ['missing', ['a reading off a gauge or thermometer']]],
    [
      'readings',
      'words only',
      { readings: [], notes: { ...NOTES, readings: 'x' } },
      ['partly', ['a reading off a gauge or thermometer']],
    ],
    [
      'readings',
      'no temperature',
      { readings: [{ kind: 'low-side-pressure' }] },
      ['partly', ['a temperature']],
    ],
    [
      'readings',
      'no pressure',
      { readings: [{ kind: 'vent-temperature' }] },
      ['partly', ['a pressure, standing or running']],
    ],
    [
      'readings',
      'coolant needs no more than one',
      { medium: 'coolant', readings: [{ kind: 'fluid-temperature' }] },
      ['done', []],
    ],
    [
      'trace',
      'nothing',
      { methods: [], findings: [], tracePhotos: 0 },
      ['missing', ['a method that was tried', 'a confirmed finding', 'a photo of the spot']],
    ],
    [
      'trace',
      'words only',
      { methods: [], findings: [], tracePhotos: 0, notes: { ...NOTES, trace: 'x' } },
      ['partly', ['a method that was tried', 'a confirmed finding', 'a photo of the spot']],
    ],
    ['trace', 'no method', { methods: [] }, ['partly', ['a method that was tried']]],
    ['trace', 'no photo', { tracePhotos: 0 }, ['partly', ['a photo of the spot']]],
    [
      'trace',
      'suspected only',
      { findings: [{ ...FINDING, certainty: 'suspected' }] },
      ['partly', ['a confirmed finding']],
    ],
    [
      'trace',
      'how it failed is missing',
      { findings: [{ ...FINDING, failureModeId: '' }] },
      ['partly', ['how the part failed']],
    ],
    [
      'trace',
      'why it failed is missing',
      { findings: [{ ...FINDING, causeId: '' }] },
      ['partly', ['why the part failed']],
    ],
    [
      'trace',
      'one of two findings says why and how',
      { findings: [{ ...FINDING, causeId: '', failureModeId: '' }, FINDING] },
      ['done', []],
    ],
    [
      'trace',
      'ended without a leak',
      { findings: [{ ...FINDING, componentId: 'none-confirmed' }] },
      ['done', []],
    ],
    [
      'trace',
      'a suspicion beside no leak',
      {
        findings: [
          { ...FINDING, certainty: 'suspected' },
          { ...FINDING, componentId: 'none-confirmed' },
        ],
      },
      ['done', []],
    ],
    ['repair', 'nothing', { repairs: [] }, ['missing', ['what was done, as entries']]],
    [
      'repair',
      'words only',
      { repairs: [], notes: { ...NOTES, repair: 'x' } },
      ['partly', ['what was done, as entries']],
    ],
    ['proof', 'nothing', { proofs: [] }, ['missing', ['a test with its verdict']]],
    [
      'proof',
      'words only',
      { proofs: [], notes: { ...NOTES, proof: 'x' } },
      ['partly', ['a test with its verdict']],
    ],
    [
      'proof',
      'not tight',
      { proofs: [{ verdict: 'not-tight', at: 20 }] },
      ['partly', ['a tight result: the newest test says not tight']],
    ],
    [
      'proof',
      'cannot tell',
      { proofs: [{ verdict: 'cannot-tell', at: 20 }] },
      ['partly', ['a clear result: the newest test cannot tell']],
    ],
    [
      'proof',
      'older than the repair',
      { repairs: [{ at: 21 }] },
      ['partly', ['a test after the newest repair']],
    ],
    ['proof', 'as old as the repair', { repairs: [{ at: 20 }] }, ['done', []]],
    ['charge', 'nothing', { charges: [] }, ['missing', ['what went in']]],
    ['charge', 'words only', { charges: [], notes: { ...NOTES, charge: 'x' } }, ['partly', ['what went in']]],
    ['charge', 'only taken out', { charges: [{ kind: 'recovered', at: 1 }] }, ['partly', ['what went in']]],
    ['charge', 'none needed', { charges: [{ kind: 'not-needed', at: 1 }] }, ['done', []]],
    ['write-up', 'none', { writeUpState: null }, ['missing', ['a cause-and-fix note']]],
    ['write-up', 'a draft', { writeUpState: 'draft' }, ['partly', ['a review']]],
    ['write-up', 'in review', { writeUpState: 'in-review' }, ['partly', ['the lead’s word']]],
    ['write-up', 'sent back', { writeUpState: 'sent-back' }, ['partly', ['what the lead sent it back for']]],
    [
      'write-up',
      'withdrawn',
      { writeUpState: 'withdrawn' },
      ['partly', ['a note in force: it was withdrawn']],
    ],
  ])('%s: %s', (key, _what, change, expected) => expect(linkOf(change, key)).toEqual(expected));
});

describe('proved tight', () => {
  test.each([
    [[{ verdict: 'tight' as const, at: 20 }], [], true],
    [[{ verdict: 'tight' as const, at: 20 }], [{ at: 20 }], true],
    [[{ verdict: 'tight' as const, at: 20 }], [{ at: 5 }, { at: 21 }], false],
    [[{ verdict: 'tight' as const, at: 20 }], [{ at: 21 }, { at: 5 }], false],
    [[{ verdict: 'not-tight' as const, at: 20 }], [], false],
    [
      [
        { verdict: 'tight' as const, at: 20 },
        { verdict: 'not-tight' as const, at: 20 },
      ],
      [],
      false,
    ],
    [
      [
        { verdict: 'not-tight' as const, at: 10 },
        { verdict: 'tight' as const, at: 20 },
      ],
      [],
      true,
    ],
    [
      [
        { verdict: 'tight' as const, at: 20 },
        { verdict: 'not-tight' as const, at: 10 },
      ],
      [],
      true,
    ],
    [[], [], false],
  ])('%j after %j: %s', (proofs, repairs, expected) =>
    expect(provedTight({ proofs, repairs })).toBe(expected),
  );
});

describe('what a published cause lacks', () => {
  test.each<[string, Partial<CaseRecord>, string[]]>([
    ['nothing', {}, []],
    ['a finding', { findings: [] }, ['no finding is confirmed']],
    ['a confirmed one', { findings: [{ ...FINDING, certainty: 'suspected' }] }, ['no finding is confirmed']],
    ['why', { findings: [{ ...FINDING, causeId: '' }] }, ['no finding says why the part failed']],
    ['why, on one of two only', { findings: [{ ...FINDING, causeId: '' }, FINDING] }, []],
    [
      'evidence',
      { methods: [{ outcome: 'nothing' }], tracePhotos: 0 },
      ['neither a method that showed the leak nor a photo of the spot is on record'],
    ],
    [
      'a photo, where a method showed it',
      { methods: [{ outcome: 'nothing' }, { outcome: 'found' }], tracePhotos: 0 },
      [],
    ],
    ['a method, where a photo shows it', { methods: [] }, []],
  ])('%s', (_what, change, lacks) => expect(lackingForCause({ ...WHOLE, ...change })).toEqual(lacks));
});

describe('what a published cure lacks', () => {
  test.each<[string, Partial<CaseRecord>, string[]]>([
    ['nothing', {}, []],
    ['a repair', { repairs: [] }, ['no repair is on record']],
    ['a proof', { proofs: [] }, ['no proof is on record']],
    [
      'a tight proof',
      { proofs: [{ verdict: 'cannot-tell', at: 20 }] },
      ['the newest proof does not say tight'],
    ],
    ['a newer proof', { repairs: [{ at: 21 }] }, ['the newest proof is older than the newest repair']],
    ['nothing, at the same moment', { repairs: [{ at: 20 }] }, []],
  ])('%s', (_what, change, lacks) => expect(lackingForCure({ ...WHOLE, ...change })).toEqual(lacks));
});

test('a finding that says no leak leaves the case open', () => {
  const change = { writeUpState: null, proofs: [], repairs: [] };
  expect(caseState({ ...WHOLE, ...change })).toBe('leak-found');
  expect(caseState({ ...WHOLE, ...change, findings: [{ ...FINDING, componentId: 'none-confirmed' }] })).toBe(
    'open',
  );
});
