import type { Spin } from '../../electrons.ts';
import { DomainError } from '../../errors.ts';
import { findGeometry } from '../../geometry/catalogue.ts';
import { type ExpectedEpsilon, expectedEpsilon } from '../expected-epsilon.ts';
import { findGroup } from '../groups.ts';
import { type Direction, type Mechanism, selectionRules } from '../selection-rules.ts';
import { settingText } from '../setting.ts';
import type { Term } from '../term-label.ts';
import { type ExcitedTerm, excitedTerms } from './excited-terms.ts';
import { groundTermIn } from './ground-term.ts';
import { type View, viewOfGroup, viewOfSkeleton } from './view.ts';

/** A centre whose transitions are asked for. */
export interface TransitionsRequest {
  /** d electrons; null or no whole number where the count is not known. */
  dCount: number | null;
  /** Polyhedral symbol; null where it is not known. */
  geometry: string | null;
  /** Null while it is not stated. */
  spin: Spin | 'crossover' | null;
  /** Donor at each vertex; null while the isomer is not stated. */
  sites: readonly string[] | null;
  /** Pairs of vertices that a chelate ring joins. */
  chelates: readonly (readonly [number, number])[];
  /** A group chosen for analysis. */
  effectiveGroup: string | null;
}

/** One transition between two terms of one group. */
export interface TermTransition {
  from: string;
  to: string;
  spinAllowed: boolean;
  laporteAllowed: boolean | null;
  dipole: Record<Direction, boolean>;
  vibronic: Record<Direction, string[]>;
  magneticDipole: Record<Direction, boolean>;
  spinOrbit: { allowed: boolean | null; order: number | null };
  mechanism: Mechanism;
  expectedEpsilon: ExpectedEpsilon;
}

/** The transitions as one group judges them. */
export interface TransitionView {
  /** `polyhedron`: all donors alike. `donorSet`: donors by their labels. `framework`: with chelate rings. */
  kind: 'framework' | 'donorSet' | 'effective' | 'polyhedron';
  group: string;
  /** The choice of axes that the labels hang on, in words. */
  setting: string;
  axes: string;
  /** What the ground term becomes; only the lowest of several is occupied when they lie far apart. */
  ground: string[];
  rows: (Pick<ExcitedTerm, 'label' | 'count' | 'freeIon'> & { spinAllowed: boolean; transitions: TermTransition[] })[];
}

/** All transitions from the ground term of a centre. */
export interface TransitionTable {
  /** Group of the ideal polyhedron, in which `label` and the ground term are. */
  parent: string | null;
  ground: { label: string; group: string; spin: Spin } | null;
  views: TransitionView[];
  /** What is not told, and why, in sentences. */
  notes: string[];
}

const tableOf = (notes: string[], parent: string | null = null): TransitionTable => ({
  parent,
  ground: null,
  views: [],
  notes,
});

/**
 * All d–d transitions from the ground term at once: by excited term and polarisation, in the group of the framework,
 * of the donor set, and of one chosen.
 *
 * Terms of the ideal polyhedron come from those of the free ion and are carried down to each group as it lies in the
 * polyhedron. Vibrations are those of metal and donors. What the record leaves open is told in `notes`.
 */
export function transitionTable(request: TransitionsRequest): TransitionTable {
  const { dCount, spin } = request;
  const geometry = request.geometry === null ? null : findGeometry(request.geometry);
  if (dCount === null || !Number.isInteger(dCount)) {
    return tableOf(['The number of d electrons is not known, so there are no d–d terms to tell.']);
  }
  if (dCount <= 0 || dCount >= 10) {
    return tableOf([
      `A d${dCount} centre has no d–d transitions: its d shell is ${dCount <= 0 ? 'empty' : 'full'}. What bands it shows are charge transfer or belong to the ligands.`,
    ]);
  }
  if (!geometry) return tableOf(['The geometry is not known, so the terms have no group.']);
  if (spin === 'crossover') {
    return tableOf(
      [
        'The centre crosses over between two spin states, each with a ground term of its own: ask for one with spin=low or spin=high.',
      ],
      geometry.group,
    );
  }
  const ground = groundTermIn(geometry, dCount, spin);
  if (!ground.term) return tableOf([ground.reason], geometry.group);

  const { views, notes } = viewsOf(request, geometry.symbol);
  const excited = excitedTerms(geometry.group, dCount, ground.term);
  return {
    parent: geometry.group,
    ground: { label: termLabel(ground.term), group: geometry.group, spin: ground.spin },
    views: views.map(({ kind, view }) => judged(kind, view, ground.term, excited)),
    notes: [...notes, 'Terms whose spin differs from that of the ground term by more than one are left out.'],
  };
}

interface KindOfView {
  kind: TransitionView['kind'];
  view: View;
}

function viewsOf({ sites, chelates, effectiveGroup }: TransitionsRequest, geometry: string) {
  const { vertices } = findGeometry(geometry)!;
  const [views, notes]: [KindOfView[], string[]] = [[], []];
  if (sites && sites.length === vertices.length) {
    views.push({ kind: 'framework', view: viewOfSkeleton({ geometry, sites, links: chelates }) });
    views.push({ kind: 'donorSet', view: viewOfSkeleton({ geometry, sites }) });
  } else {
    notes.push('The isomer is not stated: the transitions are those of the ideal polyhedron with all donors alike.');
    views.push({ kind: 'polyhedron', view: viewOfSkeleton({ geometry, sites: vertices.map(() => 'A') }) });
  }
  if (effectiveGroup) {
    try {
      views.push({ kind: 'effective', view: viewOfGroup(geometry, effectiveGroup) });
    } catch (error) {
      if (!(error instanceof DomainError)) throw error;
      notes.push(`The effective group cannot be judged: ${error.message}`);
    }
  }
  return { views, notes };
}

const termLabel = ({ multiplicity, irrep }: Term): string => `${multiplicity}${irrep}`;

function judged(kind: KindOfView['kind'], view: View, ground: Term, excited: readonly ExcitedTerm[]): TransitionView {
  const group = findGroup(view.group)!;
  const below = (term: Term): Term[] =>
    view.descent(term.irrep).map(({ irrep }) => ({ multiplicity: term.multiplicity, irrep }));
  const known = new Map<string, TermTransition>();
  const transition = (from: Term, to: Term): TermTransition => {
    const key = `${termLabel(from)} ${termLabel(to)}`;
    const found = known.get(key) ?? judge(group, from, to, view.modes);
    known.set(key, found);
    return found;
  };
  const starts = below(ground);
  return {
    kind,
    group: view.group,
    setting: settingText(view.group),
    axes: view.axes,
    ground: starts.map(termLabel),
    rows: excited.map((term) => ({
      label: term.label,
      count: term.count,
      freeIon: term.freeIon,
      spinAllowed: term.multiplicity === ground.multiplicity,
      transitions: starts.flatMap((from) => below(term).map((to) => transition(from, to))),
    })),
  };
}

function judge(
  group: NonNullable<ReturnType<typeof findGroup>>,
  from: Term,
  to: Term,
  modes: string[],
): TermTransition {
  const rules = selectionRules(group, from, to, modes);
  const { spinAllowed, laporteAllowed, dipole, vibronic, magneticDipole, mechanism } = rules;
  const { allowed, order } = rules.spinOrbit;
  return {
    from: termLabel(from),
    to: termLabel(to),
    spinAllowed,
    laporteAllowed,
    dipole,
    vibronic,
    magneticDipole,
    spinOrbit: { allowed, order },
    mechanism,
    expectedEpsilon: expectedEpsilon(rules),
  };
}
