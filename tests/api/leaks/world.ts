import { createHash } from 'node:crypto';
import { formatAccession } from '#src/contracts/accession.ts';
import { lab, person } from '../people.ts';

// A registry with records of every visibility and state, written down as plain facts. `model.ts` reads who sees what
// from these facts alone, and knows nothing of the program's own conditions.

export type LabName = 'north' | 'south' | 'east';
type State = 'draft' | 'registered' | 'withdrawn';
type Visibility = 'programme' | 'lab';
export interface Owned {
  id: string;
  lab: LabName;
  maker: Member;
  state: State;
  visibility: Visibility;
}
export interface Complex extends Owned {
  accession: string;
  element: string;
  group: number;
  oxidationState: number;
  dCount: number;
  geometry: string;
  ligand: string;
  note: string;
  embargoed: boolean;
  mergedInto?: string;
}
export interface Band {
  id: string;
  /** nm */
  wavelength: number;
  epsilon: number;
  class: 'd-d' | 'LMCT' | 'MLCT';
  state: 'attested' | 'proposed';
}
export interface Spectrum extends Owned {
  complex: Complex;
  preparation: Preparation | null;
  title: string;
  note: string;
  colour: string;
  flag: string | null;
  bands: Band[];
}
export interface Preparation extends Owned {
  complex: Complex;
  label: string;
  /** A second complex in the formula unit, of a double salt. */
  partner: Complex | null;
}
export interface Folio {
  id: string;
  name: string;
  lab: LabName;
  embargoed: boolean;
  shows: 'attested' | 'proposed';
  items: { complex: Complex; spectra: Spectrum[] | null }[];
}
export interface Grant {
  to: AskerName;
  folio: Folio;
  level: 'view' | 'download';
  ended: boolean;
}

/** Roles by lab; what is no member here is a guest. */
const PEOPLE = {
  northContributor: { north: 'contributor' },
  northLead: { north: 'lead' },
  northReader: { north: 'contributor' },
  southContributor: { south: 'contributor' },
  southLead: { south: 'lead' },
  bothLabs: { north: 'contributor', south: 'lead' },
  /** A member of East who is a guest of folios of North and South. */
  memberAndGuest: { east: 'lead' },
  steward: {},
  guestWithout: {},
  guestView: {},
  guestDownload: {},
  guestMixed: {},
  guestEnded: {},
} as const satisfies Record<string, Partial<Record<LabName, 'lead' | 'contributor'>>>;
export type AskerName = keyof typeof PEOPLE;
export type Member = Extract<
  AskerName,
  'northContributor' | 'northLead' | 'southContributor' | 'southLead' | 'memberAndGuest' | 'steward'
>;
export const askers = Object.keys(PEOPLE) as AskerName[];
export const rolesOf = (name: AskerName): Partial<Record<LabName, 'lead' | 'contributor'>> => PEOPLE[name];

export interface World {
  people: Record<AskerName, { id: string; email: string; token: string }>;
  labs: Record<LabName, string>;
  complexes: Complex[];
  spectra: Spectrum[];
  preparations: Preparation[];
  folios: Folio[];
  grants: Grant[];
}

let number = 0;
const id = (kind: string) => `0000${kind}-${String(++number).padStart(4, '0')}-7000-8000-00000000feed`;

const KINDS: (Partial<Complex> & { element: string; dCount: number; ligand: string })[] = [
  { element: 'Co', dCount: 6, ligand: 'NH3' },
  { element: 'Cr', dCount: 3, ligand: 'NH3', visibility: 'lab' },
  { element: 'Ni', dCount: 8, ligand: 'en', visibility: 'lab', lab: 'south' },
  { element: 'Fe', dCount: 5, ligand: 'ox', lab: 'south' },
  { element: 'V', dCount: 2, ligand: 'OH2', state: 'draft' },
  { element: 'Mn', dCount: 4, ligand: 'acac', embargoed: true },
  { element: 'Cu', dCount: 9, ligand: 'py', state: 'withdrawn' },
  { element: 'Ru', dCount: 6, ligand: 'bpy', visibility: 'lab', mergedInto: 'first' },
  { element: 'Ti', dCount: 1, ligand: 'Cl', lab: 'south', state: 'draft', visibility: 'lab' },
  { element: 'Os', dCount: 6, ligand: 'phen', lab: 'east' },
];

function complexes(): Complex[] {
  const made = KINDS.map(({ mergedInto: _, ...kind }, i): Complex => {
    const of = kind.lab ?? 'north';
    return {
      id: id('c0'),
      accession: formatAccession('ZF', 810_000 + 37 * i),
      group: 9,
      oxidationState: 2 + (i % 2),
      geometry: i % 3 === 0 ? 'T-4' : 'OC-6',
      lab: of,
      maker: makerOf(of),
      state: 'registered',
      visibility: 'programme',
      note: `inner remark ${i} of the complex`,
      embargoed: false,
      ...kind,
    };
  });
  KINDS.forEach(({ mergedInto }, i) => {
    if (mergedInto) made[i]!.mergedInto = made[0]!.accession;
  });
  return made;
}

const makerOf = (of: LabName): Member =>
  of === 'north' ? 'northContributor' : of === 'south' ? 'southContributor' : 'memberAndGuest';

/** On every complex, preparations and spectra of each lab, visibility and state that differ in sight. */
function partsOf(complex: Complex, partner: Complex): { preparations: Preparation[]; spectra: Spectrum[] } {
  const variants: Pick<Owned, 'lab' | 'visibility' | 'state'>[] = [
    { lab: 'north', visibility: 'programme', state: 'registered' },
    { lab: 'north', visibility: 'lab', state: 'registered' },
    { lab: 'south', visibility: 'programme', state: 'registered' },
    { lab: 'south', visibility: 'lab', state: 'registered' },
    { lab: 'north', visibility: 'programme', state: 'draft' },
    { lab: 'south', visibility: 'programme', state: 'withdrawn' },
  ];
  const preparations = variants
    .filter(({ state }) => state !== 'draft')
    .map((variant, i): Preparation => {
      const label = `batch ${complex.element} ${i}`;
      return {
        id: id('b0'),
        complex,
        maker: makerOf(variant.lab),
        label,
        partner: i === 0 ? partner : null,
        ...variant,
      };
    });
  const spectra = variants.map((variant, i): Spectrum => {
    const wavelength = 310 + ((complex.dCount * 70 + i * 40) % 600);
    const band = (shift: number, state: Band['state'], of: Band['class']): Band => ({
      id: id('d0'),
      wavelength: wavelength + shift,
      epsilon: 10 + i,
      class: of,
      state,
    });
    return {
      id: id('a0'),
      complex,
      preparation: preparations[(i + 1) % preparations.length]!,
      maker: makerOf(variant.lab),
      title: `run ${i} of ${complex.element}`,
      note: `inner remark ${i} of the run`,
      colour: `#${String(100_000 + ++number)}`,
      flag: i % 2 === 0 ? `flag-${variant.lab}` : null,
      bands: [band(0, 'attested', 'd-d'), band(150, 'proposed', i % 2 === 0 ? 'LMCT' : 'MLCT')],
      ...variant,
    };
  });
  return { preparations, spectra };
}

/** The facts, and the same in the database. */
export async function buildWorld(): Promise<World> {
  const labs = { north: await lab('North Quay'), south: await lab('South Pier'), east: await lab('East Dock') };
  const people = {} as World['people'];
  for (const name of askers) {
    const roles = Object.entries(rolesOf(name)).map(([of, role]) => [labs[of as LabName], role]);
    people[name] = await person(name, {
      labs: Object.fromEntries(roles),
      steward: name === 'steward',
      ...(name === 'northReader' ? { scopes: ['read'] } : {}),
    });
  }
  const made = complexes();
  const parts = made.map((complex, i) => partsOf(complex, made[(i + 1) % made.length]!));
  const spectra = parts.flatMap((part) => part.spectra);
  const of = (complex: Complex) => spectra.filter((spectrum) => spectrum.complex === complex);
  const [open, northOwn, southOwn, southOpen, , embargoed, withdrawn] = made as [
    Complex,
    Complex,
    Complex,
    Complex,
    Complex,
    Complex,
    Complex,
  ];
  const folio = (facts: Partial<Folio> & Pick<Folio, 'name' | 'items'>): Folio => ({
    id: id('f0'),
    lab: 'north',
    embargoed: false,
    shows: 'attested',
    ...facts,
  });
  const all = (complex: Complex) => ({ complex, spectra: null });
  const some = (complex: Complex, ...places: number[]) => ({ complex, spectra: places.map((i) => of(complex)[i]!) });
  const folios = [
    folio({ name: 'attested of North', items: [all(open), all(northOwn), all(embargoed), all(withdrawn)] }),
    folio({ name: 'proposed, a few', shows: 'proposed', items: [some(open, 1, 3), some(southOpen, 0, 2)] }),
    folio({ name: 'under embargo', embargoed: true, items: [all(southOpen)] }),
    // A steward put a record of North's own in: South's guests have no business with it.
    folio({ name: 'of South', lab: 'south', shows: 'proposed', items: [all(southOwn), all(northOwn)] }),
    folio({ name: 'northern, one of its own', items: [some(northOwn, 0)] }),
  ] as const;
  const [attested, few, shut, ofSouth, one] = folios;
  const grants: Grant[] = [
    { to: 'guestView', folio: attested!, level: 'view', ended: false },
    { to: 'guestDownload', folio: attested!, level: 'download', ended: false },
    { to: 'guestDownload', folio: shut!, level: 'download', ended: false },
    { to: 'guestMixed', folio: few!, level: 'download', ended: false },
    { to: 'guestMixed', folio: attested!, level: 'view', ended: false },
    { to: 'guestMixed', folio: ofSouth!, level: 'view', ended: false },
    { to: 'guestEnded', folio: attested!, level: 'download', ended: true },
    { to: 'memberAndGuest', folio: ofSouth!, level: 'view', ended: false },
    { to: 'memberAndGuest', folio: one!, level: 'download', ended: false },
  ];
  const world: World = {
    people,
    labs,
    complexes: made,
    spectra,
    preparations: parts.flatMap((part) => part.preparations),
    folios: [...folios],
    grants,
  };
  await store(world);
  return world;
}

const float64 = (values: number[]) => Buffer.from(new Float64Array(values).buffer);

async function store(world: World): Promise<void> {
  const { database } = await import('#src/server/database.ts');
  const { store: objects } = await import('#src/server/store.ts');
  const schema = await import('#src/db/schema/index.ts');
  const { record } = await import('#src/server/trail.ts');
  const { newId } = await import('#src/server/ids.ts');
  const { write } = await database();
  const at = '2026-11-02T08:00:00.000Z';
  const far = '2999-01-01T00:00:00.000Z';
  const stamps = { createdAt: at, updatedAt: at };
  const owned = ({ id: key, lab: of, maker, state, visibility }: Owned) => ({
    id: key,
    labId: world.labs[of],
    makerId: world.people[maker].id,
    state,
    visibility,
    ...stamps,
  });
  const bytes = Buffer.from('nm,absorbance\r\n400,0.1\r\n500,0.2\r\n600,0.1\r\n# invented\r\n');
  const sha256 = createHash('sha256').update(bytes).digest('hex');
  await objects().put(`originals/${sha256}`, bytes);

  await write(async (tx) => {
    await tx.insert(schema.files).values({ sha256, size: bytes.length, createdAt: at });
    for (const [i, c] of world.complexes.entries()) {
      await tx.insert(schema.complexes).values({
        ...owned(c),
        number: i,
        accession: c.accession,
        identityKey: `leak ${i}`,
        formula: `[${c.element}(${c.ligand})6]2+`,
        charge: 2,
        hill: `${c.element}X6`,
        composition: { [c.element]: 1 },
        molarMass: 100 + i,
        pointGroup: i % 2 === 0 ? 'Oh' : 'D3',
        embargoUntil: c.embargoed ? far : null,
        mergedInto: c.mergedInto ?? null,
        notes: c.note,
        search: `${c.accession} [${c.element}(${c.ligand})6]2+ typed-as-${c.element}`.toLowerCase(),
        withdrawnReason: c.state === 'withdrawn' ? 'wrong salt' : null,
      });
      await tx.insert(schema.centres).values({
        complexId: c.id,
        ordinal: 0,
        element: c.element,
        group: c.group,
        oxidationState: c.oxidationState,
        dCount: c.dCount,
        geometry: c.geometry,
        geometryBasis: 'assumed',
      });
      await tx.insert(schema.complexLigands).values({
        complexId: c.id,
        ordinal: 0,
        abbreviation: c.ligand,
        count: 6,
        charge: 0,
        denticity: 1,
        donors: ['N'],
      });
      const actor = { accountId: world.people[c.maker].id };
      const entry = { action: 'register', subjectType: 'complex' as const, subjectId: c.id };
      await record(tx, actor, { ...entry, detail: { typed: c.note } });
    }
    for (const p of world.preparations) {
      await tx
        .insert(schema.preparations)
        .values({ ...owned(p), complexId: p.complex.id, label: p.label, formula: null });
      const parts = [p.complex, ...(p.partner ? [p.partner] : [])];
      await tx
        .insert(schema.preparationComponents)
        .values(parts.map((c) => ({ preparationId: p.id, complexId: c.id, perFormulaUnit: 1 })));
    }
    for (const [i, s] of world.spectra.entries()) {
      await tx.insert(schema.spectra).values({
        ...owned(s),
        complexId: s.complex.id,
        preparationId: s.preparation?.id ?? null,
        title: s.title,
        notes: s.note,
        operator: s.note,
        technique: 'solution',
        concentration: 0.01,
        pathLength: 1,
        fileSha256: sha256,
        fileName: `run-${s.id}.csv`,
        block: i,
        xUnit: 'nm',
        yUnit: 'absorbance',
        points: 3,
        xMin: 1e7 / 600,
        xMax: 1e7 / 400,
        colour: s.colour,
        flags: s.flag ? [{ code: s.flag, detail: 'told by a check' }] : [],
      });
      await tx
        .insert(schema.spectrumSolvents)
        .values({ spectrumId: s.id, ordinal: 0, name: 'water', volumeFraction: 1 });
      await tx.insert(schema.spectrumSpecies).values({ spectrumId: s.id, complexId: s.complex.id, basis: 'declared' });
      await tx.insert(schema.spectrumPoints).values({
        spectrumId: s.id,
        x: float64([400, 500, 600]),
        y: float64([0.1, 0.2, 0.1]),
        wavenumber: float64([1e7 / 600, 20_000, 25_000]),
        value: float64([0.1, 0.2, 0.1]),
      });
      for (const [ordinal, band] of s.bands.entries())
        await tx.insert(schema.bands).values({
          id: band.id,
          spectrumId: s.id,
          ordinal,
          wavenumber: 1e7 / band.wavelength,
          height: 0.1,
          quantity: 'absorbance',
          epsilon: band.epsilon,
          found: 'typed',
          class: band.class,
          state: band.state,
          proposedBy: world.people[s.maker].id,
        });
    }
    for (const f of world.folios) {
      await tx.insert(schema.folios).values({
        id: f.id,
        name: f.name,
        labId: world.labs[f.lab],
        makerId: world.people[f.lab === 'north' ? 'northLead' : 'southLead'].id,
        licence: 'CC-BY-4.0',
        embargoUntil: f.embargoed ? far : null,
        shows: f.shows,
        ...stamps,
      });
      await tx.insert(schema.folioItems).values(
        f.items.map(({ complex, spectra }, ordinal) => ({
          folioId: f.id,
          complexId: complex.id,
          ordinal,
          spectra: spectra?.map((spectrum) => spectrum.id) ?? null,
        })),
      );
    }
    for (const g of world.grants)
      await tx.insert(schema.grants).values({
        id: newId(),
        folioId: g.folio.id,
        accountId: world.people[g.to].id,
        level: g.level,
        expiresAt: g.ended ? '2020-01-01T00:00:00.000Z' : far,
        termsAcceptedAt: at,
        termsLicence: 'CC-BY-4.0',
        grantedBy: world.people.steward.id,
        createdAt: at,
      });
  });
}
