/**
 * Scripts and style sheets need this response's nonce; style attributes are refused altogether.
 * The development server evaluates code and talks over a socket, so it alone gets the wider rules.
 */
export function contentSecurityPolicy(nonce: string, development: boolean): string {
  const directives = development
    ? [
        `script-src 'self' 'nonce-${nonce}' 'strict-dynamic' 'unsafe-eval'`,
        `style-src 'self' 'unsafe-inline'`,
        `connect-src 'self' ws:`,
      ]
    : [
        `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'`,
        `style-src 'self' 'nonce-${nonce}'`,
        `style-src-attr 'none'`,
        `connect-src 'self'`,
      ];
  return [
    `default-src 'self'`,
    ...directives,
    `img-src 'self' data:`,
    `font-src 'self'`,
    `worker-src 'self'`,
    `object-src 'none'`,
    `base-uri 'self'`,
    `form-action 'self'`,
    `frame-ancestors 'none'`,
  ].join('; ');
}
