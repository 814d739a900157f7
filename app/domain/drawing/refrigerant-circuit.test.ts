import { describe, expect, test } from 'vitest';
import { baseVocabulary, entriesFor } from '../vocabulary/vocabulary.ts';
import { DRAWING, REFRIGERANT_SPOTS, TARGET } from './refrigerant-circuit.ts';

describe('the drawing of the refrigerant circuit', () => {
  test('every part of the vocabulary stands on it once', () => {
    const parts = entriesFor(baseVocabulary, 'component', 'refrigerant').filter(
      ({ media }) => media.length > 0,
    );
    expect(REFRIGERANT_SPOTS.map(({ id }) => id).sort()).toEqual(parts.map(({ id }) => id).sort());
  });

  test('every target lies inside and none covers another', () => {
    for (const one of REFRIGERANT_SPOTS) {
      expect(one.x).toBeGreaterThanOrEqual(TARGET / 2);
      expect(one.x).toBeLessThanOrEqual(DRAWING.width - TARGET / 2);
      expect(one.y).toBeGreaterThanOrEqual(TARGET / 2);
      expect(one.y).toBeLessThanOrEqual(DRAWING.height - TARGET / 2);
      for (const other of REFRIGERANT_SPOTS) {
        if (other === one) continue;
        expect(
          Math.max(Math.abs(one.x - other.x), Math.abs(one.y - other.y)),
          `${one.id} and ${other.id}`,
        ).toBeGreaterThanOrEqual(TARGET);
      }
    }
  });
});
