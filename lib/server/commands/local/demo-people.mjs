/** The demo's sign-ins: one of each role, in an invented domain that no mail reaches (RFC 2606). */
export const DEMO_PEOPLE = /** @type {const} */ ([
  { email: 'weights@skerry.example', role: 'weights engineer' },
  { email: 'chief@skerry.example', role: 'chief engineer' },
  { email: 'simulation@skerry.example', role: 'simulation engineer' },
  { email: 'admin@skerry.example', role: 'administrator' },
]);
