import type { ComplexRecord } from '#src/contracts/complexes.ts';

type Centre = ComplexRecord['centres'][number];

/** "octahedron" is the polyhedron; a centre in it is octahedral. Names of other polyhedra stay as they are. */
const ADJECTIVES: Record<string, string> = {
  'OC-6': 'octahedral',
  'T-4': 'tetrahedral',
  'SP-4': 'square planar',
  'TBPY-5': 'trigonal bipyramidal',
  'SPY-5': 'square pyramidal',
  'TPR-6': 'trigonal prismatic',
  'TP-3': 'trigonal planar',
  'L-2': 'linear',
  'CU-8': 'cubic',
  'SAPR-8': 'square antiprismatic',
  'DD-8': 'dodecahedral',
  'PBPY-7': 'pentagonal bipyramidal',
};

/** Shape of a centre in a word, after the polyhedral symbol. @see IUPAC Recommendations 2005, IR-9.3.2 (from memory) */
export const geometryWord = (symbol: string, name: string): string => ADJECTIVES[symbol] ?? name;

/** What is said of a geometry beside its symbol. */
export const BASES: Record<Centre['geometryBasis'], string> = {
  found: 'found',
  assumed: 'assumed',
  fluxional: 'fluxional',
  unknown: 'not known',
};

/** What is true of a record that shows it to fewer or for a time. */
export function visibilityText({
  visibility,
  embargoUntil,
  lab,
}: Pick<ComplexRecord, 'visibility' | 'embargoUntil' | 'lab'>): string {
  const who = visibility === 'lab' ? `${lab.name} only` : 'every lab of the programme';
  return embargoUntil ? `${who}; guests not before ${embargoUntil.slice(0, 10)}` : who;
}

/** Kinds of centre with how many there are of each, in the order in which they come. */
export function centreKinds(centres: readonly Centre[]): { centre: Centre; count: number }[] {
  const kinds = new Map<string, { centre: Centre; count: number }>();
  for (const centre of centres) {
    const key = JSON.stringify(centre);
    kinds.set(key, { centre, count: (kinds.get(key)?.count ?? 0) + 1 });
  }
  return [...kinds.values()];
}

/** Action words of the trail, as a person reads them; one that is not listed is shown as it is. */
const ACTIONS: Record<string, string> = {
  draft: 'kept as a draft',
  register: 'registered',
  change: 'changed',
  withdraw: 'withdrawn',
  'add-preparation': 'preparation added',
  merge: 'merged',
  'take-in': 'took in a merged record',
};
const FIELDS: Record<string, string> = {
  geometry: 'geometry',
  isomer: 'isomer',
  chirality: 'chirality',
  spinState: 'spin state',
  notes: 'notes',
  visibility: 'visibility',
  embargoUntil: 'embargo',
};

/** What an entry of the history says in a line: "changed: notes, isomer". */
export function historyText({ action, detail }: Pick<ComplexRecord['history'][number], 'action' | 'detail'>): string {
  const word = ACTIONS[action] ?? action;
  const reason = typeof detail.withdrawnReason === 'string' ? detail.withdrawnReason : null;
  if (action === 'take-in' && typeof detail.from === 'string') return `${detail.from} was merged into this record`;
  if (action === 'merge' && typeof detail.into === 'string')
    return `${String(detail.accession)} was merged into ${detail.into}`;
  if (action === 'withdraw' && reason) return `${word}: ${reason}`;
  const fields = Object.keys(detail).flatMap((name) => FIELDS[name] ?? []);
  const reopened = typeof detail.reopened === 'number' && detail.reopened > 0 ? detail.reopened : null;
  const parts = [fields.length > 0 && action === 'change' ? `${word}: ${fields.join(', ')}` : word];
  if (typeof detail.of === 'string') parts.push(`as ${detail.of}`);
  if (reopened) parts.push(`${reopened} ${reopened === 1 ? 'attestation' : 'attestations'} reopened`);
  return parts.join('; ');
}
