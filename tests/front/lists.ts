// The spellings and senders that the front refuses: used against the front alone and against the built server.

/** Other spellings of /admin/secret, each seen to reach a route or a guard in one framework or another. */
export const OTHER_SPELLINGS = [
  '//admin/secret',
  '/\\admin/secret',
  '/.//admin/secret',
  '/x/..//admin/secret',
  '//admin/secret/',
  '/./admin/secret',
  '/admin/./secret',
  '/admin/../admin/secret',
  '/admin//secret',
  '/admin\\secret',
  '/%61dmin/secret',
  '/%2561dmin/secret',
  '/%252561dmin/secret',
  '/admin%2fsecret',
  '/admin%2Fsecret',
  '/admin%5csecret',
  '/%2e/admin/secret',
  '/%2E%2E/admin/secret',
  '/x/%2e%2e/admin/secret',
  '/.%2e/admin/secret',
  '/x/..%2fadmin/secret',
  '/%2fadmin/secret',
  '/%5cadmin/secret',
  '/admin/secret%00',
  '/admin/secret%0d%0aX: y',
  '/admin/secret%',
  '/admin/secret%2',
  '/admin/secret%zz',
  '/admin/secret%ff',
  '/admin/secret%c0%ae',
  '/admin/secret#x',
  '/admin/secret\t',
  '/admin/"secret"',
  '/admin/<secret>',
  '/admin/sécret',
  'admin/secret',
  'http://127.0.0.1:4321/admin/secret',
  'http://evil.example/admin/secret',
  '/admin/secret/..',
  '/..',
  '/%7e/secret',
];

/** Content types of bodies that a foreign page can send without asking first, and others. */
export const CONTENT_TYPES = [
  'application/x-www-form-urlencoded',
  'multipart/form-data; boundary=x',
  'text/plain',
  'application/json',
  'application/octet-stream',
  undefined,
];

/** Headers by which a request says that it is not from a page of ours. `own` is our origin. */
export const foreignSenders = (own: string): Record<string, string | undefined>[] => [
  { Origin: undefined },
  { Origin: 'null' },
  { Origin: 'https://evil.example' },
  { Origin: `${own}.evil.example` },
  { Origin: own.replace('http:', 'https:') },
  { Origin: own.replace(/:\d+$/, ':1') },
  { Origin: `${own}/` },
  { Origin: own.toUpperCase() },
  { Origin: own, 'Sec-Fetch-Site': 'cross-site' },
  { Origin: own, 'Sec-Fetch-Site': 'same-site' },
  { Origin: own, 'Sec-Fetch-Site': 'none' },
  { Origin: undefined, 'Sec-Fetch-Site': 'cross-site' },
];

/** What every response has, whatever it answers. */
export const EVERYWHERE = {
  'x-content-type-options': /^nosniff$/,
  'referrer-policy': /^same-origin$/,
  'x-frame-options': /^DENY$/,
  'content-security-policy':
    /^default-src 'none'; (?=.*script-src 'self')(?=.*frame-ancestors 'none')(?=.*base-uri 'none')(?=.*object-src 'none')/,
  'cross-origin-opener-policy': /^same-origin$/,
  'permissions-policy': /camera=\(\)/,
  'cache-control': /./,
};
