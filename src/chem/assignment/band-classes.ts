/** What a band can be assigned to, from the metal's own transitions to what nobody has settled. */
export const bandClasses = [
  'd-d',
  'LMCT',
  'MLCT',
  'intraligand',
  'interligand',
  'intervalence',
  'metal-metal',
  'metal-centred-other',
  'ion-pair',
  'other',
  'unassigned',
] as const;
export type BandClass = (typeof bandClasses)[number];
