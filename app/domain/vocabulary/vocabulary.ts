import taxonomy from './data/taxonomy.json' with { type: 'json' };

export const CATALOGUE_KINDS = [
  'medium',
  'circuit',
  'component',
  'failure-mode',
  'mechanism',
  'cause',
  'symptom',
  'method',
  'repair-action',
] as const;
export type CatalogueKind = (typeof CATALOGUE_KINDS)[number];

export const CATALOGUE_KIND_NAMES: Record<CatalogueKind, string> = {
  medium: 'Media',
  circuit: 'Circuits',
  component: 'Parts',
  'failure-mode': 'Failure modes',
  mechanism: 'Mechanisms',
  cause: 'Causes',
  symptom: 'Symptoms',
  method: 'Methods',
  'repair-action': 'Repair actions',
};

/** One word of the trade. `media` empty means every medium; `own` marks a shop's addition. */
export type Entry = {
  kind: CatalogueKind;
  id: string;
  name: string;
  media: readonly string[];
  otherNames: readonly string[];
  note: string;
  own: boolean;
  hidden: boolean;
};

/** A shop's addition: a new entry, or further names for (or the hiding of) one that the base has. */
export type Addition = Omit<Entry, 'own'>;

export type Vocabulary = ReadonlyMap<CatalogueKind, ReadonlyMap<string, Entry>>;

export type Caution = { id: string; title: string; text: string };
export const CAUTIONS: readonly Caution[] = taxonomy.cautions;

export type MethodFacts = {
  canFind: string;
  cannotFind: string;
  sensitivity: string;
  basis: string;
  cautions: string[];
};

const METHOD_FACTS = new Map<string, MethodFacts>(taxonomy.methods.map((method) => [method.id, method]));

/** What a method of tracing can and cannot find; sensitivities are rules of thumb, marked common practice or from memory. */
export function methodFacts(id: string): MethodFacts | undefined {
  return METHOD_FACTS.get(id);
}

/** The usual proofs of a medium, in words. Common practice, no source. */
export function usualProofs(medium: string): string[] {
  return (taxonomy.proofsByMedium as Record<string, string[]>)[medium] ?? [];
}

export const baseVocabulary: Vocabulary = readTaxonomy();

function readTaxonomy(): Vocabulary {
  const kinds = new Map<CatalogueKind, Map<string, Entry>>(CATALOGUE_KINDS.map((kind) => [kind, new Map()]));
  const add = (
    kind: CatalogueKind,
    id: string,
    name: string,
    media: readonly string[],
    otherNames: readonly string[] = [],
    note = '',
  ) => {
    kinds.get(kind)?.set(id, { kind, id, name, media, otherNames, note, own: false, hidden: false });
  };
  for (const medium of taxonomy.media) {
    add('medium', medium.id, medium.name, [], medium.otherNames);
    for (const circuit of medium.circuits) add('circuit', circuit.id, circuit.name, [medium.id]);
    for (const part of medium.components)
      add('component', part.id, part.name, [medium.id], part.otherNames, part.where);
  }
  const none = taxonomy.unconfirmedComponent;
  add('component', none.id, none.name, [], none.otherNames, none.where);
  for (const mode of taxonomy.failureModes)
    add('failure-mode', mode.id, mode.name, [], mode.otherNames, mode.meaning);
  for (const { id, name } of taxonomy.mechanisms) add('mechanism', id, name, []);
  for (const { id, name } of taxonomy.causes) add('cause', id, name, []);
  for (const symptom of taxonomy.symptoms) {
    const words = [...symptom.operatorWords, ...symptom.technicianWords];
    add('symptom', symptom.id, capital(words[0] ?? spelledOut(symptom.id)), symptom.media, words.slice(1));
  }
  for (const method of taxonomy.methods)
    add('method', method.id, method.name, method.media, [], method.canFind);
  for (const { id, name } of taxonomy.repairActions) add('repair-action', id, name, []);
  return kinds;
}

/** The base with a shop's additions laid over it; ids are stable, so records keep their meaning. */
export function extendVocabulary(base: Vocabulary, additions: readonly Addition[]): Vocabulary {
  const kinds = new Map(CATALOGUE_KINDS.map((kind) => [kind, new Map(base.get(kind))]));
  for (const addition of additions) {
    const entries = kinds.get(addition.kind);
    const before = entries?.get(addition.id);
    entries?.set(
      addition.id,
      before
        ? {
            ...before,
            otherNames: [...new Set([...before.otherNames, ...addition.otherNames])],
            hidden: addition.hidden,
          }
        : { ...addition, own: true },
    );
  }
  return kinds;
}

export function entry(vocabulary: Vocabulary, kind: CatalogueKind, id: string): Entry | undefined {
  return vocabulary.get(kind)?.get(id);
}

/** The entries of a kind that may be chosen, for one medium or for all, in the order of the vocabulary. */
export function entriesFor(vocabulary: Vocabulary, kind: CatalogueKind, medium?: string): Entry[] {
  return [...(vocabulary.get(kind)?.values() ?? [])].filter(
    ({ hidden, media }) => !hidden && (medium === undefined || media.length === 0 || media.includes(medium)),
  );
}

/** The name of an entry; an id that the vocabulary does not know is spelled out. */
export function nameOf(vocabulary: Vocabulary, kind: CatalogueKind, id: string): string {
  return entry(vocabulary, kind, id)?.name ?? capital(spelledOut(id));
}

/** What a circuit is called: its own label, else the name of its place. */
export function circuitName(
  vocabulary: Vocabulary,
  { label, place }: { label: string; place: string },
): string {
  return label || nameOf(vocabulary, 'circuit', place);
}

/** The names of a medium's parts by id, for the circuit drawing. */
export function partNames(vocabulary: Vocabulary, medium: string): Record<string, string> {
  return Object.fromEntries(entriesFor(vocabulary, 'component', medium).map(({ id, name }) => [id, name]));
}

/** A medium's name without what stands in brackets. */
export function mediumName(vocabulary: Vocabulary, id: string): string {
  return nameOf(vocabulary, 'medium', id).replace(/\s*\(.*\)$/, '');
}

export type GuardedStep = 'trace' | 'repair' | 'proof' | 'charge';

const CAUTIONS_BEFORE: Record<GuardedStep, { everywhere: string[]; byMedium: Record<string, string[]> }> = {
  trace: {
    everywhere: ['ppe', 'local-code'],
    byMedium: {
      refrigerant: ['nitrogen-regulator', 'no-oxygen', 'enclosed', 'flammable'],
      'hydraulic-oil': ['injection', 'stored-pressure'],
      fuel: ['injection'],
      coolant: ['hot-coolant'],
    },
  },
  repair: {
    everywhere: ['ppe', 'local-code'],
    byMedium: {
      refrigerant: ['recover', 'frostbite', 'flammable', 'high-voltage'],
      'hydraulic-oil': ['stored-pressure', 'injection'],
      fuel: ['injection', 'stored-pressure'],
      coolant: ['hot-coolant'],
      'compressed-air': ['stored-pressure'],
    },
  },
  proof: {
    everywhere: ['ppe', 'local-code'],
    byMedium: {
      refrigerant: ['nitrogen-regulator', 'no-oxygen', 'enclosed'],
      'hydraulic-oil': ['injection', 'stored-pressure'],
      coolant: ['hot-coolant'],
      'compressed-air': ['stored-pressure'],
    },
  },
  charge: {
    everywhere: ['ppe', 'local-code'],
    byMedium: {
      refrigerant: ['high-side-can', 'no-topup', 'recover', 'frostbite', 'flammable'],
      coolant: ['hot-coolant'],
      'hydraulic-oil': ['stored-pressure'],
    },
  },
};

/** The usual cautions before a step. Common practice, no source; local codes and the maker's manual come first. */
export function cautionsFor(step: GuardedStep, medium: string): Caution[] {
  const { everywhere, byMedium } = CAUTIONS_BEFORE[step];
  const wanted = new Set([...(byMedium[medium] ?? []), ...everywhere]);
  return CAUTIONS.filter(({ id }) => wanted.has(id));
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}

function spelledOut(id: string): string {
  return id.replaceAll('-', ' ');
}
