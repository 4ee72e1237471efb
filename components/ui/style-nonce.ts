'use client';

import { setNonce } from 'get-nonce';

/**
 * Radix writes a style element while a dialog is open; the content security policy lets it through with the page's
 * nonce, which the browser keeps on the scripts that came with it.
 */
export function allowOwnStyles(): void {
  const nonce = document.querySelector<HTMLScriptElement>('script[nonce]')?.nonce;
  if (nonce) setNonce(nonce);
}
