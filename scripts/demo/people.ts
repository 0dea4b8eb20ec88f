import { DEMO_ACCOUNTS } from '#src/server/demo-accounts.ts';

// The Tidewater programme is invented, and so is everybody in it: four laboratories round one harbour that pool their
// complexes, and a glass works that reads some of them.

export const labs = [
  {
    key: 'quay',
    name: 'North Quay Lab',
    place: 'Tidewater (invented)',
    description: 'Makes ammines, aqua ions and cyanides of the first row. Invented for the demo.',
    outsideAttest: true,
  },
  {
    key: 'marsh',
    name: 'Saltmarsh Spectroscopy',
    place: 'Tidewater (invented)',
    description: 'The facility that measures for the others. Invented for the demo.',
    outsideAttest: true,
    facility: true,
  },
  {
    key: 'hill',
    name: 'Hillfoot Photochemistry',
    place: 'Upper Tidewater (invented)',
    description: 'Photosensitisers of ruthenium, osmium, rhenium and copper. Invented for the demo.',
    outsideAttest: false,
  },
  {
    key: 'mint',
    name: 'Old Mint Pigments',
    place: 'Tidewater (invented)',
    description: 'Chelates and halides for glazes and enamels. Invented for the demo.',
    outsideAttest: true,
  },
] as const;
export type LabKey = (typeof labs)[number]['key'];

export interface DemoPerson {
  email: string;
  name: string;
  steward?: boolean;
  labs?: Partial<Record<LabKey, 'lead' | 'contributor'>>;
}

const [steward, lead, contributor, guest] = DEMO_ACCOUNTS;

/** Those with a published address sign in; the others made their records and cannot. */
export const people: readonly DemoPerson[] = [
  { email: steward.email, name: steward.name, steward: true },
  { email: lead.email, name: lead.name, labs: { quay: 'lead' } },
  { email: contributor.email, name: contributor.name, labs: { quay: 'contributor' } },
  { email: guest.email, name: guest.name },
  { email: 'o.ferrant@demo.example', name: 'Odile Ferrant', labs: { marsh: 'lead' } },
  { email: 'k.asante@demo.example', name: 'Kwame Asante', labs: { marsh: 'contributor' } },
  { email: 'r.tolvanen@demo.example', name: 'Riikka Tolvanen', labs: { hill: 'lead' } },
  { email: 'j.marchetti@demo.example', name: 'Jacopo Marchetti', labs: { hill: 'contributor', marsh: 'contributor' } },
  { email: 'a.okafor@demo.example', name: 'Adaeze Okafor', labs: { mint: 'lead' } },
];

/** Who registers, prepares and measures for each lab, and who leads it. */
export const staff: Record<LabKey, { maker: string; lead: string }> = {
  quay: { maker: contributor.email, lead: lead.email },
  marsh: { maker: 'k.asante@demo.example', lead: 'o.ferrant@demo.example' },
  hill: { maker: 'j.marchetti@demo.example', lead: 'r.tolvanen@demo.example' },
  mint: { maker: 'a.okafor@demo.example', lead: 'a.okafor@demo.example' },
};
