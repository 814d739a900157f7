import { createContext, useContext } from 'react';

/** The nonce of this page's scripts; empty in the browser, where scripts have already run. */
export const NonceContext = createContext('');

export function useNonce(): string {
  return useContext(NonceContext);
}
