/** Password of every demo account. It is published, which is why demo mode listens on this machine only. */
export const DEMO_PASSWORD = 'cobalt-blue-demo';

/** The people of the demo data, by what they may do. The addresses use a domain reserved for examples (RFC 2606). */
export const DEMO_ACCOUNTS = [
  { email: 'steward@demo.example', name: 'Demo Steward', part: 'steward' },
  { email: 'lead@demo.example', name: 'Demo Lead', part: 'lead' },
  { email: 'contributor@demo.example', name: 'Demo Contributor', part: 'contributor' },
  { email: 'guest@demo.example', name: 'Demo Guest', part: 'guest' },
] as const;
