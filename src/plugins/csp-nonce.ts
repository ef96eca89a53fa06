/** The nonce that the server put into the page: the only style elements allowed are those that carry it. */
export function cspNonce(): string {
  const meta = document.querySelector<HTMLMetaElement>('meta[property="csp-nonce"]')
  return meta?.nonce || meta?.getAttribute('nonce') || ''
}
