/** The licences a folio may be handed out under, by their SPDX identifiers (SPDX License List). */
export const LICENCES = [
  { value: 'CC-BY-4.0', label: 'CC BY 4.0: use with credit' },
  { value: 'CC-BY-SA-4.0', label: 'CC BY-SA 4.0: credit, share alike' },
  { value: 'CC-BY-NC-4.0', label: 'CC BY-NC 4.0: credit, not commercial' },
  { value: 'CC0-1.0', label: 'CC0 1.0: no conditions' },
  { value: 'ODbL-1.0', label: 'ODbL 1.0: database, share alike' },
  { value: 'PDDL-1.0', label: 'PDDL 1.0: database, no conditions' },
] as const;
export type Licence = (typeof LICENCES)[number]['value'];

export const SHOWS = [
  { value: 'attested', label: 'Attested bands only' },
  { value: 'proposed', label: 'Attested and proposed bands' },
] as const;
