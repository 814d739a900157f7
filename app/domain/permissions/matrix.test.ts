import { describe, expect, test } from 'vitest';
import { isRole, ROLE_NAMES, ROLES } from './actor.ts';
import { ACTIONS, may } from './matrix.ts';

describe('who may do what', () => {
  test('everyone reads, comments, flags and has tokens', () => {
    for (const role of ROLES) {
      for (const action of ['shop:read', 'case:comment', 'write-up:flag', 'token:own'] as const) {
        expect(may(role, action)).toBe(true);
      }
    }
  });

  test('the judgement is the lead’s alone', () => {
    const alone = ['gate:override', 'write-up:review', 'case:close-unsolved'] as const;
    for (const action of alone) expect(ROLES.filter((role) => may(role, action))).toEqual(['lead']);
  });

  test('people and words are the admin’s alone', () => {
    const alone = ['people:manage', 'catalogue:manage'] as const;
    for (const action of alone) expect(ROLES.filter((role) => may(role, action))).toEqual(['admin']);
  });

  test('the office keeps the book and touches no case', () => {
    expect(ACTIONS.filter((action) => may('office', action))).toEqual([
      'shop:read',
      'case:comment',
      'case:park',
      'case:share',
      'photo:add',
      'machine:edit',
      'machine:import',
      'book:write',
      'book:reverse',
      'write-up:flag',
      'token:own',
    ]);
  });

  test('what a technician may', () => {
    expect(ACTIONS.filter((action) => may('tech', action))).toEqual([
      'shop:read',
      'case:open',
      'case:edit',
      'case:comment',
      'case:judge-likeness',
      'case:same-on-mine',
      'case:park',
      'photo:add',
      'machine:edit',
      'book:write',
      'write-up:write',
      'write-up:flag',
      'token:own',
    ]);
  });
});

test('a role is one of four words', () => {
  expect(ROLES.map(isRole)).toEqual([true, true, true, true]);
  expect(['owner', '', null, 4, {}].map(isRole)).toEqual([false, false, false, false, false]);
  expect(Object.keys(ROLE_NAMES)).toEqual([...ROLES]);
});
