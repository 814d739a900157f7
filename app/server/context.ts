import { createContext } from 'react-router';
import type { Actor } from '#app/domain/permissions/actor.ts';
import type { Preferences } from '#app/domain/units/preferences.ts';

/** Who is signed in, with what the pages show of them. */
export type Viewer = Actor & {
  email: string;
  shopName: string;
  sessionId: string;
  preferences: Preferences;
};

export const viewerContext = createContext<Viewer | null>(null);
export const requestIdContext = createContext<string>('');
