import { NextResponse, type NextRequest } from 'next/server'

/** Headers of every page. The API stays outside (a proxy in front cuts long bodies short) and sets its own. */
export function proxy(request: NextRequest): NextResponse {
  const nonce = btoa(String.fromCharCode(...crypto.getRandomValues(new Uint8Array(16))))
  const policy = contentSecurityPolicy(nonce)
  const forwarded = new Headers(request.headers)
  forwarded.set('x-nonce', nonce)
  forwarded.set('content-security-policy', policy)
  forwarded.set('x-stillstand-path', request.nextUrl.pathname + request.nextUrl.search)
  const response = NextResponse.next({ request: { headers: forwarded } })
  const headers: Record<string, string> = {
    'cache-control': 'no-store',
    'content-security-policy': policy,
    'cross-origin-opener-policy': 'same-origin',
    'permissions-policy': 'camera=(self), geolocation=(), microphone=()',
    'referrer-policy': 'same-origin',
    'x-content-type-options': 'nosniff',
    'x-frame-options': 'DENY',
  }
  if ((process.env['PUBLIC_URL'] ?? '').startsWith('https:'))
    headers['strict-transport-security'] = 'max-age=31536000'
  for (const [name, value] of Object.entries(headers)) response.headers.set(name, value)
  return response
}

function contentSecurityPolicy(nonce: string): string {
  // The development server evaluates code and injects styles; production does neither.
  const isDevelopment = process.env.NODE_ENV === 'development'
  return [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${isDevelopment ? " 'unsafe-eval'" : ''}`,
    isDevelopment ? "style-src 'self' 'unsafe-inline'" : `style-src 'self' 'nonce-${nonce}'`,
    // recharts' container and radix' popper set style attributes.
    "style-src-attr 'unsafe-inline'",
    "img-src 'self' blob: data:",
    "font-src 'self'",
    `connect-src 'self'${isDevelopment ? ' ws:' : ''}`,
    "worker-src 'self' blob:",
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ].join('; ')
}

export const config = {
  matcher: ['/((?!api(?:/|$)|_next/static|_next/image|.*\\.(?:svg|png|ico|webmanifest|wasm|js)$).*)'],
}
