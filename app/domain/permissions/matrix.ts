import type { Role } from './actor.ts';

/** Who may do what. Reading is open to every role of the shop; another shop's rows do not exist for anyone. */
const MATRIX = {
  'shop:read': ['tech', 'lead', 'office', 'admin'],
  'case:open': ['tech', 'lead'],
  'case:edit': ['tech', 'lead'],
  'case:comment': ['tech', 'lead', 'office', 'admin'],
  'case:judge-likeness': ['tech', 'lead'],
  'case:same-on-mine': ['tech', 'lead'],
  'case:assign': ['lead', 'admin'],
  'case:park': ['tech', 'lead', 'office'],
  'case:close-unsolved': ['lead'],
  'case:import': ['lead', 'admin'],
  'case:share': ['lead', 'office'],
  'gate:override': ['lead'],
  'photo:add': ['tech', 'lead', 'office'],
  'photo:original': ['lead', 'admin'],
  'machine:edit': ['tech', 'lead', 'office', 'admin'],
  'machine:import': ['lead', 'office', 'admin'],
  'book:write': ['tech', 'lead', 'office'],
  'book:reverse': ['lead', 'office'],
  'write-up:write': ['tech', 'lead'],
  'write-up:review': ['lead'],
  'write-up:flag': ['tech', 'lead', 'office', 'admin'],
  'token:own': ['tech', 'lead', 'office', 'admin'],
  'people:manage': ['admin'],
  'catalogue:manage': ['admin'],
} as const satisfies Record<string, readonly Role[]>;

export type Action = keyof typeof MATRIX;

export const ACTIONS = Object.keys(MATRIX) as Action[];

/** The one resolver of the role × action matrix, for the server and the page alike. */
export function may(role: Role, action: Action): boolean {
  return (MATRIX[action] as readonly Role[]).includes(role);
}
