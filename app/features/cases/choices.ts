import { readingKindsFor } from '#app/domain/readings/readings.ts';
import { type Preferences, preferredUnits } from '#app/domain/units/preferences.ts';
import { type Quantity, UNITS, unitsOf } from '#app/domain/units/units.ts';
import {
  type CatalogueKind,
  entriesFor,
  mediumName,
  type Vocabulary,
} from '#app/domain/vocabulary/vocabulary.ts';

export type Choice = { value: string; label: string };

export function choicesOf(vocabulary: Vocabulary, kind: CatalogueKind, medium?: string): Choice[] {
  return entriesFor(vocabulary, kind, medium).map(({ id, name }) => ({ value: id, label: name }));
}

/** The units of some quantities, the person's own first. */
export function unitChoices(quantities: readonly Quantity[], preferences: Preferences): Choice[] {
  const preferred = preferredUnits(preferences);
  return quantities.flatMap((quantity) => {
    const own = quantity in preferred ? preferred[quantity as keyof typeof preferred] : undefined;
    return unitsOf(quantity)
      .sort((x, y) => Number(y === own) - Number(x === own))
      .map((id) => ({ value: id, label: UNITS[id].label }));
  });
}

/** What a case's own rows add to the choices: the gauge photos taken, the cylinders of the book. */
export type OwnChoices = { photos: Choice[]; cylinders: Choice[] };

/** Everything that the entry forms of a case's links offer to choose from. */
export function linkChoices(
  vocabulary: Vocabulary,
  medium: string,
  preferences: Preferences,
  own: OwnChoices,
) {
  const isFluid = medium !== 'refrigerant';
  return {
    readingKinds: readingKindsFor(medium).map(({ id, name, quantity }) => ({
      value: id,
      label: name,
      quantity,
    })),
    pressureUnits: unitChoices(['pressure'], preferences),
    temperatureUnits: unitChoices(['temperature'], preferences),
    amountUnits: unitChoices(isFluid ? ['volume', 'mass'] : ['mass', 'volume'], preferences),
    methods: choicesOf(vocabulary, 'method', medium),
    components: choicesOf(vocabulary, 'component', medium),
    failureModes: choicesOf(vocabulary, 'failure-mode', medium),
    mechanisms: choicesOf(vocabulary, 'mechanism'),
    causes: choicesOf(vocabulary, 'cause'),
    actions: choicesOf(vocabulary, 'repair-action'),
    ...own,
  };
}
export type LinkChoices = ReturnType<typeof linkChoices>;

/** Symptoms as chips: those of a medium first in a group of their own when it is known. */
export function symptomChips(vocabulary: Vocabulary, mediumFirst?: string) {
  const media = entriesFor(vocabulary, 'medium').map(({ id }) => id);
  const ordered = mediumFirst ? [mediumFirst, ...media.filter((id) => id !== mediumFirst)] : media;
  return entriesFor(vocabulary, 'symptom')
    .map(({ id, name, otherNames, media: of }) => {
      const first = ordered.find((medium) => of.includes(medium)) ?? ordered[0] ?? '';
      return {
        value: id,
        label: name,
        group: mediumName(vocabulary, first),
        words: otherNames.join(' '),
        place: ordered.indexOf(first),
      };
    })
    .sort((x, y) => x.place - y.place)
    .map(({ place: _place, ...chip }) => chip);
}
