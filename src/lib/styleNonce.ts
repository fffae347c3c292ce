/**
 * Dialogs lock the page's scroll with a style element of their own. The strict content policy lets it
 * in only with the nonce that the server wrote into the page.
 */
export function shareStyleNonce(): void {
  const meta = document.querySelector<HTMLMetaElement>('meta[property="csp-nonce"]');
  const nonce = meta?.nonce ?? meta?.content;
  if (nonce) Object.assign(globalThis, { __webpack_nonce__: nonce });
}
