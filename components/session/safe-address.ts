/** Where to go after signing in: an address of this site, or the front page. */
export function safeAddress(to: string | string[] | undefined): string {
  const one = Array.isArray(to) ? to[0] : to
  if (!one || !/^\/(?![/\\])/.test(one) || /[\u0000-\u001f\\]/.test(one)) return '/'
  return one.startsWith('/sign-in') ? '/' : one
}
