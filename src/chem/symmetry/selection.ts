import { DomainError } from '../errors.ts';
import { type ExpectedEpsilon, expectedEpsilon } from './expected-epsilon.ts';
import { findGroup, type IrrepCount, type PointGroup } from './groups.ts';
import { type LowerGroup, lowerGroups } from './lower-groups.ts';
import { type SelectionRules, selectionRules } from './selection-rules.ts';
import { type Modes, selectionSteps } from './selection-steps.ts';
import { plainSkeleton } from './skeletons.ts';
import { readTerm, requireIrrep } from './term-label.ts';
import { type Skeleton, vibrations as vibrationsOf } from './vibrations.ts';

/** A transition to be judged. */
export interface SelectionRequest {
  /** `Oh`, `Dinfh`. */
  group: string;
  /** Terms with their multiplicity: `2T2g`, `2Eg`. */
  from: string;
  to: string;
  /** Modes that may lend intensity; those of the group's plain skeleton when left out. */
  vibrations?: readonly IrrepCount[] | undefined;
  /** The actual skeleton, of the same group, whose modes may lend intensity; in place of `vibrations`. */
  skeleton?: Skeleton | undefined;
}

/** What symmetry says about a transition, with the argument. */
export interface SelectionAnalysis extends SelectionRules {
  group: string;
  /** Order of ε that such transitions show, in dm³ mol⁻¹ cm⁻¹. */
  expectedEpsilon: ExpectedEpsilon;
  /** Subgroups that open a polarisation, from high to low. */
  lowerGroups: LowerGroup[];
  /** The argument in numbered sentences, each in plain text. */
  steps: string[];
}

/**
 * Selection analysis of a transition between two terms.
 *
 * @throws DomainError `unknown-symbol` or `unreadable` on `group`, `from`, `to` or `vibrations`; `out-of-range` on
 *   `skeleton` when it has another group, or as `vibrations`
 */
export function selectionAnalysis(request: SelectionRequest): SelectionAnalysis {
  const group = findGroup(request.group);
  if (!group) {
    throw new DomainError(
      'unknown-symbol',
      `No point group has the symbol “${request.group}”. Examples: Oh, D4h, C2v.`,
      'group',
    );
  }
  const from = readTerm(group.symbol, request.from, 'from');
  const to = readTerm(group.symbol, request.to, 'to');
  const modes = request.skeleton ? modesOfSkeleton(group, request.skeleton) : modesOf(group, request.vibrations);
  const rules = selectionRules(group, from, to, modes.irreps);
  const epsilon = expectedEpsilon(rules);
  const lower = lowerGroups(group.symbol, from, to);
  const steps = selectionSteps({ group, from, to, modes, rules, epsilon, lower });
  return {
    group: group.symbol,
    ...rules,
    expectedEpsilon: epsilon,
    lowerGroups: lower,
    steps: steps.map((step, i) => `${i + 1}. ${step}`),
  };
}

function modesOfSkeleton(group: PointGroup, skeleton: Skeleton): Modes {
  const found = vibrationsOf(skeleton);
  if (found.group !== group.symbol) {
    throw new DomainError(
      'out-of-range',
      `The skeleton has the group ${found.group}; the terms are labelled in ${group.symbol}.`,
      'skeleton',
    );
  }
  const text = `${skeleton.geometry} (${skeleton.sites.join(' ')})`;
  return { irreps: found.vibrations.map(({ irrep }) => irrep), skeleton: text, given: true };
}

function modesOf(group: PointGroup, given: readonly IrrepCount[] | undefined): Modes {
  if (given) {
    const present = given.filter(({ count }) => count > 0).map(({ irrep }) => irrep);
    for (const irrep of present) requireIrrep(group.symbol, irrep, 'vibrations');
    return { irreps: [...new Set(present)], skeleton: null, given: true };
  }
  const skeleton = plainSkeleton(group.symbol);
  if (!skeleton) return { irreps: [], skeleton: null, given: false };
  return {
    irreps: vibrationsOf(skeleton).vibrations.map(({ irrep }) => irrep),
    skeleton: skeleton.geometry,
    given: false,
  };
}
