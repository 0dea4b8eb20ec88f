import {
  type AskerName,
  type Band,
  type Complex,
  type Folio,
  type Grant,
  type Owned,
  type Preparation,
  rolesOf,
  type Spectrum,
  type World,
} from './world.ts';

// Who sees what, as design §8 says it, read from the facts of the world. Nothing of the program is used here.

export const isSteward = (asker: AskerName) => asker === 'steward';
export const isMember = (asker: AskerName) => isSteward(asker) || Object.keys(rolesOf(asker)).length > 0;

/** A record that belongs to a lab, to a member as a member. */
function toMember(asker: AskerName, record: Owned): boolean {
  if (isSteward(asker)) return true;
  if (!isMember(asker)) return false;
  const role = rolesOf(asker)[record.lab];
  if (record.state === 'draft') return record.maker === asker || role === 'lead';
  return record.visibility === 'programme' || role !== undefined;
}

const live = (world: World, asker: AskerName): Grant[] =>
  world.grants.filter((g) => g.to === asker && !g.ended && !g.folio.embargoed);

/** What a folio may share: registered, not under embargo, and not another lab's own. */
const shareable = (folio: Folio, record: Owned) =>
  record.state === 'registered' && (record.visibility === 'programme' || record.lab === folio.lab);
const opensComplex = ({ folio }: Grant, complex: Complex) =>
  !complex.embargoed && shareable(folio, complex) && folio.items.some((item) => item.complex === complex);
const opensSpectrum = (grant: Grant, spectrum: Spectrum) =>
  opensComplex(grant, spectrum.complex) &&
  shareable(grant.folio, spectrum) &&
  grant.folio.items.some(
    (item) => item.complex === spectrum.complex && (item.spectra === null || item.spectra.includes(spectrum)),
  );

export const complexAsMember = (asker: AskerName, complex: Complex) => !complex.mergedInto && toMember(asker, complex);
export const spectrumAsMember = (asker: AskerName, spectrum: Spectrum) =>
  complexAsMember(asker, spectrum.complex) && toMember(asker, spectrum);

export interface Sight {
  complexes: Complex[];
  spectra: Spectrum[];
  /** Spectra whose files may be taken. */
  takes: Spectrum[];
  takesComplexes: Complex[];
  preparations: Preparation[];
  folios: Folio[];
  bandsOf: (spectrum: Spectrum) => Band[];
  /** Bands that may leave in a file. */
  takenBandsOf: (spectrum: Spectrum) => Band[];
}

export function sightOf(world: World, asker: AskerName): Sight {
  const grants = live(world, asker);
  const takers = grants.filter((g) => g.level === 'download');
  const living = world.complexes.filter((complex) => !complex.mergedInto);
  const complexesBy = (some: Grant[]) =>
    living.filter((complex) => complexAsMember(asker, complex) || some.some((g) => opensComplex(g, complex)));
  const spectraBy = (some: Grant[]) =>
    world.spectra.filter(
      (spectrum) =>
        spectrumAsMember(asker, spectrum) ||
        some.some((g) => !spectrum.complex.mergedInto && opensSpectrum(g, spectrum)),
    );
  const bandsBy = (some: Grant[]) => (spectrum: Spectrum) =>
    spectrum.bands.filter(
      (band) =>
        spectrumAsMember(asker, spectrum) ||
        some.some((g) => opensSpectrum(g, spectrum) && (g.folio.shows === 'proposed' || band.state === 'attested')),
    );
  return {
    complexes: complexesBy(grants),
    takesComplexes: complexesBy(takers),
    spectra: spectraBy(grants),
    takes: spectraBy(takers),
    preparations: world.preparations.filter(
      (preparation) => complexAsMember(asker, preparation.complex) && toMember(asker, preparation),
    ),
    folios: world.folios.filter(
      (folio) => isSteward(asker) || rolesOf(asker)[folio.lab] !== undefined || grants.some((g) => g.folio === folio),
    ),
    bandsOf: bandsBy(grants),
    takenBandsOf: bandsBy(takers),
  };
}

/** Values with how many complexes have each, as a facet tells them. */
export function tally<T>(items: readonly T[], valuesOf: (item: T) => (string | number)[]): Record<string, number> {
  const counts: Record<string, number> = {};
  for (const item of items)
    for (const value of new Set(valuesOf(item).map(String))) counts[value] = (counts[value] ?? 0) + 1;
  return counts;
}
