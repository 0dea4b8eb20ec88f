interface LicenceWords {
  /** SPDX identifier (SPDX License List). */
  value: string;
  label: string;
  /** What one may do, in a sentence; the licence's own text decides. */
  allows: string;
  /** Where its text stands. */
  href: string;
}

/** The licences a folio may be handed out under. */
export const LICENCES = [
  {
    value: 'CC-BY-4.0',
    label: 'CC BY 4.0: use with credit',
    allows: 'You may use, change and pass on what you find, also commercially, if you credit the lab.',
    href: 'https://creativecommons.org/licenses/by/4.0/',
  },
  {
    value: 'CC-BY-SA-4.0',
    label: 'CC BY-SA 4.0: credit, share alike',
    allows: 'You may use, change and pass on what you find if you credit the lab and pass it on under this licence.',
    href: 'https://creativecommons.org/licenses/by-sa/4.0/',
  },
  {
    value: 'CC-BY-NC-4.0',
    label: 'CC BY-NC 4.0: credit, not commercial',
    allows: 'You may use, change and pass on what you find, but not commercially, if you credit the lab.',
    href: 'https://creativecommons.org/licenses/by-nc/4.0/',
  },
  {
    value: 'CC0-1.0',
    label: 'CC0 1.0: no conditions',
    allows: 'You may use, change and pass on what you find without conditions. Credit is good practice all the same.',
    href: 'https://creativecommons.org/publicdomain/zero/1.0/',
  },
  {
    value: 'ODbL-1.0',
    label: 'ODbL 1.0: database, share alike',
    allows:
      'You may use and change the data if you credit the lab and pass databases made of it on under this licence.',
    href: 'https://opendatacommons.org/licenses/odbl/1-0/',
  },
  {
    value: 'PDDL-1.0',
    label: 'PDDL 1.0: database, no conditions',
    allows: 'You may use, change and pass on the data without conditions. Credit is good practice all the same.',
    href: 'https://opendatacommons.org/licenses/pddl/1-0/',
  },
] as const satisfies readonly LicenceWords[];
export type Licence = (typeof LICENCES)[number]['value'];

/** The words for a licence, or undefined for one that is no longer given out. */
export const licenceOf = (id: string): LicenceWords | undefined => LICENCES.find(({ value }) => value === id);

export const SHOWS = [
  { value: 'attested', label: 'Attested bands only' },
  { value: 'proposed', label: 'Attested and proposed bands' },
] as const;

export const LEVELS = [
  { value: 'view', label: 'Read on screen' },
  { value: 'download', label: 'Read and download files' },
] as const;
