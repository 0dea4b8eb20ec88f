import { findGroup } from '#src/chem/symmetry/index.ts';

/** What the symmetry page shows; all of it stands in the address. */
export interface SymmetryState {
  /** Schoenflies symbol. */
  group: string;
  /** Shows the rows of the double group, too. */
  double: boolean;
  /** Factors of the product. */
  irreps: string[];
  /** Of a square or cube of one irrep. */
  part: 'symmetric' | 'antisymmetric' | null;
  /** Subgroup to descend to, and which way it lies in the group. */
  into: string | null;
  along: string | null;
  /** Free-ion term to split. */
  term: string;
  /** Transition to judge. */
  from: string | null;
  to: string | null;
  /** Skeleton whose vibrations are shown, and a label for each of its sites. */
  geometry: string;
  donors: string[];
  /** Atoms in place of the skeleton, as pasted. */
  atoms: string;
  /** Å */
  tolerance: number;
  /** Vibration on show: irrep, set and partner. */
  mode: string | null;
}

export const START: SymmetryState = {
  group: 'Oh',
  double: false,
  irreps: [],
  part: null,
  into: null,
  along: null,
  term: '3F',
  from: null,
  to: null,
  geometry: 'OC-6',
  donors: [],
  atoms: '',
  tolerance: 0.1,
  mode: null,
};

const MOST_FACTORS = 12;

/** The state that an address tells; what it does not tell, or tells wrongly, is as at the start. */
export function stateOf(search: string): SymmetryState {
  const query = new URLSearchParams(search);
  const text = (name: string): string | null => query.get(name) || null;
  const part = text('part');
  const tolerance = Number(text('tolerance'));
  const list = (name: string): string[] => (text(name) ?? '').split('.').filter((item) => item !== '');
  const asked = text('group');
  return {
    group: asked && findGroup(asked) ? asked : START.group,
    double: text('double') === '1',
    irreps: list('irreps').slice(0, MOST_FACTORS),
    part: part === 'symmetric' || part === 'antisymmetric' ? part : null,
    into: text('into'),
    along: text('along'),
    term: text('term') ?? START.term,
    from: text('from'),
    to: text('to'),
    geometry: text('geometry') ?? START.geometry,
    donors: list('donors'),
    atoms: (text('atoms') ?? '').replaceAll(';', '\n').slice(0, 20_000),
    tolerance: tolerance > 0 && tolerance <= 0.5 ? tolerance : START.tolerance,
    mode: text('mode'),
  };
}

/** The address of a state, without what is as at the start: `?group=D4h&double=1`. */
export function addressOf(state: Partial<SymmetryState>): string {
  const query = new URLSearchParams();
  for (const name of Object.keys(START) as (keyof SymmetryState)[]) {
    const value = state[name];
    if (value === undefined || value === null || value === '' || value === START[name]) continue;
    if (Array.isArray(value)) {
      if (value.length > 0) query.set(name, value.join('.'));
    } else if (typeof value === 'boolean') query.set(name, '1');
    else if (name === 'atoms')
      query.set(
        name,
        String(value)
          .trim()
          .replace(/\s*\n\s*/g, ';'),
      );
    else query.set(name, String(value));
  }
  const text = query.toString();
  return text && `?${text}`;
}

/** Another group: what hangs on labels of the old one is let go. */
export const withGroup = (state: SymmetryState, group: string): SymmetryState => ({
  ...state,
  group,
  irreps: [],
  part: null,
  into: null,
  along: null,
  from: null,
  to: null,
});
