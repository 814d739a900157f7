import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  type CaseRecord,
  caseState,
  evidenceChain,
  LINK_KEYS,
  lackingForCause,
  lackingForCure,
  provedTight,
} from './chain.ts';

const EMPTY: CaseRecord = {
  medium: 'refrigerant',
  complaint: '',
  symptomCount: 0,
  hoursKnown: false,
  weatherKnown: false,
  readings: [],
  methods: [],
  findings: [],
  tracePhotos: 0,
  repairs: [],
  proofs: [],
  charges: [],
  notes: { readings: '', trace: '', repair: '', proof: '', charge: '' },
  writeUpState: null,
  backToWork: false,
  parked: false,
  closedUnsolved: false,
};
const FINDING = {
  componentId: 'condenser',
  failureModeId: 'cracked',
  causeId: 'routing',
  certainty: 'confirmed' as const,
};
const WHOLE: CaseRecord = {
  ...EMPTY,
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
  writeUpState: 'published',
  backToWork: true,
};
const stateOf = (record: CaseRecord, key: string) => evidenceChain(record).find((link) => link.key === key);

describe('the evidence chain', () => {
  test('nothing recorded: seven links missing, each saying what it lacks', () => {
    const chain = evidenceChain(EMPTY);
    expect(chain.map(({ key }) => key)).toEqual([...LINK_KEYS]);
    expect(chain.every(({ state, lacks }) => state === 'missing' && lacks.length > 0)).toBe(true);
  });

  test('everything recorded: seven links done', () => {
    expect(evidenceChain(WHOLE).map(({ state }) => state)).toEqual(Array(7).fill('done'));
  });

  test.each<[string, string, Partial<CaseRecord>, string]>([
    ['complaint', 'no hours', { hoursKnown: false }, 'the machine’s hours'],
    [
      'readings',
      'a temperature alone',
      { readings: [{ kind: 'vent-temperature' }] },
      'a pressure, standing or running',
    ],
    [
      'trace',
      'a suspicion alone',
      { findings: [{ ...FINDING, certainty: 'suspected' }] },
      'a confirmed finding',
    ],
    ['trace', 'no photo', { tracePhotos: 0 }, 'a photo of the spot'],
    [
      'proof',
      'older than the repair',
      { proofs: [{ verdict: 'tight', at: 5 }] },
      'a test after the newest repair',
    ],
    ['charge', 'only taken out', { charges: [{ kind: 'recovered', at: 3 }] }, 'what went in'],
    ['write-up', 'a draft', { writeUpState: 'draft' }, 'a review'],
  ])('%s, %s: partly', (key, _what, change, lack) => {
    const found = stateOf({ ...WHOLE, ...change }, key);
    expect(found?.state).toBe('partly');
    expect(found?.lacks).toContain(lack);
  });

  test('a leak that was never found needs no confirmed finding', () => {
    const found = stateOf({ ...WHOLE, findings: [{ ...FINDING, componentId: 'none-confirmed' }] }, 'trace');
    expect(found?.lacks).not.toContain('a confirmed finding');
  });

  test('other media need no pressure', () => {
    const oil = { ...WHOLE, medium: 'hydraulic-oil', readings: [{ kind: 'fluid-temperature' }] };
    expect(stateOf(oil, 'readings')?.state).toBe('done');
  });

  test('done exactly when nothing lacks, for any record', () => {
    fc.assert(
      fc.property(
        fc.record({
          symptomCount: fc.nat(3),
          hoursKnown: fc.boolean(),
          tracePhotos: fc.nat(2),
          repairs: fc.array(fc.record({ at: fc.nat(50) }), { maxLength: 3 }),
          proofs: fc.array(
            fc.record({ verdict: fc.constantFrom('tight', 'not-tight', 'cannot-tell'), at: fc.nat(50) }),
            {
              maxLength: 3,
            },
          ),
        }),
        (part) => {
          for (const { state, lacks } of evidenceChain({ ...WHOLE, ...part } as CaseRecord)) {
            expect(state === 'done').toBe(lacks.length === 0);
          }
        },
      ),
    );
  });
});

describe('the state of a case', () => {
  test.each<[string, Partial<CaseRecord>]>([
    ['open', { ...EMPTY }],
    ['leak-found', { ...EMPTY, findings: [FINDING] }],
    ['open', { ...EMPTY, findings: [{ ...FINDING, certainty: 'ruled-out' }] }],
    ['repaired', { writeUpState: null, proofs: [] }],
    ['repaired', { writeUpState: 'draft', proofs: [{ verdict: 'not-tight', at: 40 }] }],
    ['proved-tight', { writeUpState: null, backToWork: false }],
    ['running', { writeUpState: 'in-review' }],
    ['written-up', {}],
    ['parked', { parked: true }],
    ['closed-unsolved', { parked: true, closedUnsolved: true }],
  ])('%s', (state, change) => expect(caseState({ ...WHOLE, ...change })).toBe(state));

  test('a newer test that is not tight undoes an older tight one', () => {
    const proofs = [
      { verdict: 'tight' as const, at: 20 },
      { verdict: 'not-tight' as const, at: 25 },
    ];
    expect(provedTight({ ...WHOLE, proofs })).toBe(false);
  });
});

describe('what a write-up needs', () => {
  test('a whole record lacks nothing', () => {
    expect(lackingForCause(WHOLE)).toEqual([]);
    expect(lackingForCure(WHOLE)).toEqual([]);
  });

  test.each<[Partial<CaseRecord>, string]>([
    [{ findings: [] }, 'no finding is confirmed'],
    [{ findings: [{ ...FINDING, causeId: '' }] }, 'no finding says why the part failed'],
    [
      { methods: [{ outcome: 'nothing' }], tracePhotos: 0 },
      'neither a method that showed the leak nor a photo of the spot is on record',
    ],
  ])('cause: %j', (change, lack) => expect(lackingForCause({ ...WHOLE, ...change })).toContain(lack));

  test.each<[Partial<CaseRecord>, string]>([
    [{ repairs: [] }, 'no repair is on record'],
    [{ proofs: [] }, 'no proof is on record'],
    [{ proofs: [{ verdict: 'cannot-tell', at: 30 }] }, 'the newest proof does not say tight'],
    [{ proofs: [{ verdict: 'tight', at: 1 }] }, 'the newest proof is older than the newest repair'],
  ])('cure: %j', (change, lack) => expect(lackingForCure({ ...WHOLE, ...change })).toContain(lack));
});
