import { formulaLabel, parseFormula } from './formula.ts';
import { ABSENT, oxidationStateText, parseQuantity, parseUnit, type QuantityInput, unitLabel } from './quantity.ts';
import { Runs } from './Runs.tsx';
import { runsToText } from './runs.ts';
import {
  functionLabel,
  operationLabel,
  parseCharacter,
  parseFunction,
  parseIrrep,
  parseOperation,
  parseSum,
  sumLabel,
} from './symmetry.ts';
import { parseConfiguration, parseDCount, parsePointGroup, parseTerm, parseTransition, termLabel } from './term.ts';

interface Styled {
  className?: string | undefined;
}

/** A formula in the plain text of the contract: `[Cr(ox)3]3-`, `trans-[CoCl2(en)2]+`, `K3[Cr(ox)3]·3H2O`. */
export function Formula({ formula, className }: Styled & { formula: string }) {
  return <Runs runs={parseFormula(formula)} label={formulaLabel(formula)} className={className} />;
}

/** A term symbol: `4A2g`, `4T1g(F)`, `2Sigma_g+`. */
export function Term({ term, className }: Styled & { term: string }) {
  return <Runs runs={parseTerm(term)} label={termLabel(term)} className={className} />;
}

/** An irreducible representation: `T2g`, `A1'`, `E''`, `Pi_u`, `Γ8+`. */
export function Irrep({ irrep, className }: Styled & { irrep: string }) {
  return <Runs runs={parseIrrep(irrep)} label={termLabel(irrep)} className={className} />;
}

/** A direct sum of irreps: A1g + 2T2g. */
export function IrrepSum({ terms, className }: Styled & { terms: readonly { irrep: string; count: number }[] }) {
  return <Runs runs={parseSum(terms)} label={sumLabel(terms)} className={className} />;
}

/** A class of symmetry operations: `C4^3`, `sigma_h`, `C2''`. */
export function Operation({ label, className }: Styled & { label: string }) {
  return <Runs runs={parseOperation(label)} label={operationLabel(label)} className={className} />;
}

/** A function of the coordinates: `x2-y2`, `Rz`. */
export function CoordinateFunction({ name, className }: Styled & { name: string }) {
  return <Runs runs={parseFunction(name)} label={functionLabel(name)} className={className} />;
}

/** A character: an integer, a root, a multiple of a cosine. */
export function Character({ value, className }: Styled & { value: number | string }) {
  return <Runs runs={parseCharacter(value)} className={className} />;
}

/** The symbol of a point group: `Oh`, `D4h`, `Cinfv`. */
export function PointGroup({ group, className }: Styled & { group: string }) {
  return <Runs runs={parsePointGroup(group)} label={group.replace('inf', ' infinity ')} className={className} />;
}

/** A transition, lower state first: `2T2g` → `2Eg`. */
export function Transition({ from, to, className }: Styled & { from?: string | null; to?: string | null }) {
  const label = [from, to].flatMap((end) => (end ? [termLabel(end)] : [])).join(' to ');
  return <Runs runs={parseTransition(from, to)} label={label} className={className} />;
}

/** An electron configuration: `t2g3 eg0`. */
export function Configuration({ configuration, className }: Styled & { configuration: string }) {
  return <Runs runs={parseConfiguration(configuration)} label={configuration} className={className} />;
}

/** A d-electron count: d³. */
export function DCount({ count, className }: Styled & { count: number }) {
  return <Runs runs={parseDCount(count)} label={`d ${count}`} className={className} />;
}

/** An element with its oxidation state: Co(III). */
export function OxidationState({ element, state, className }: Styled & { element: string; state: number | null }) {
  return <span className={className}>{oxidationStateText(element, state)}</span>;
}

/** A number with its uncertainty and unit: the figures in the mono font, so that they stand in columns. */
export function Quantity({ className = '', unit, ...number }: Styled & QuantityInput) {
  const figures = parseQuantity({ ...number, bracketed: unit !== undefined });
  const isAbsent = runsToText(figures) === ABSENT;
  if (!unit || isAbsent) return <Runs runs={figures} className={`num ${className}`} />;
  return (
    <span
      className={`whitespace-nowrap ${className}`}
      role="math"
      aria-label={`${runsToText(figures)} ${unitLabel(unit)}`}
    >
      <Runs runs={figures} className="num" />
      {'\u00a0'}
      <Runs runs={parseUnit(unit)} />
    </span>
  );
}

/** A unit on its own: `dm3 mol-1 cm-1`. */
export function Unit({ unit, className }: Styled & { unit: string }) {
  return <Runs runs={parseUnit(unit)} label={unitLabel(unit)} className={className} />;
}
