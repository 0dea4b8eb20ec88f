import { X } from 'lucide-react';
import { DomainError } from '#src/chem/errors.ts';
import { doubleGroup, findGroup, powerPart, productOf } from '#src/chem/symmetry/index.ts';
import { Irrep, IrrepSum, PointGroup } from '#src/components/notation/index.tsx';
import { Button } from '#src/components/ui/Button.tsx';
import { Panel } from '#src/components/ui/Panel.tsx';
import { Segmented } from '#src/components/ui/Segmented.tsx';
import type { SymmetryState } from './symmetry-address.ts';

interface Props {
  state: SymmetryState;
  change: (part: Partial<SymmetryState>) => void;
}

const MOST = 12;

/** Products of any number of irreps, and the symmetric and antisymmetric part of squares and cubes. */
export function ProductPanel({ state: { group, double, irreps, part }, change }: Props) {
  const labels = labelsOf(group, double);
  const isPower = (irreps.length === 2 || irreps.length === 3) && irreps.every((label) => label === irreps[0]);
  const own = isPower && !labels.spinors.includes(irreps[0]!) ? part : null;
  const { terms, error } = reduced(group, irreps, own);
  return (
    <Panel title="Products">
      <p className="mb-2 text-ink-soft">
        Choose irreps of <PointGroup group={group} />, up to twelve.
      </p>
      <div className="flex flex-wrap gap-1">
        {[...labels.plain, ...labels.spinors].map((label) => (
          <button
            key={label}
            type="button"
            disabled={irreps.length >= MOST}
            aria-label={`Multiply by ${label}`}
            onClick={() => change({ irreps: [...irreps, label], part: null })}
            className="inline-flex min-h-8 min-w-9 items-center justify-center rounded border border-hairline bg-glaze px-2 hover:border-zaffre hover:text-zaffre disabled:text-ink-soft"
          >
            <Irrep irrep={label} />
          </button>
        ))}
      </div>
      {irreps.length > 0 && (
        <div className="mt-3 flex flex-wrap items-center gap-x-2 gap-y-1.5">
          {irreps.map((label, i) => (
            <span key={i} className="inline-flex items-center gap-1">
              {i > 0 && <span className="mr-1">⊗</span>}
              <span className="inline-flex items-center rounded bg-zaffre-wash pl-2">
                <Irrep irrep={label} />
                <button
                  type="button"
                  aria-label={`Take ${label} out`}
                  onClick={() => change({ irreps: irreps.filter((_, k) => k !== i), part: null })}
                  className="grid size-6 place-items-center rounded text-ink-soft hover:text-zaffre"
                >
                  <X aria-hidden="true" size={12} />
                </button>
              </span>
            </span>
          ))}
          <Button size="small" kind="quiet" onClick={() => change({ irreps: [], part: null })}>
            Clear
          </Button>
        </div>
      )}
      {isPower && !labels.spinors.includes(irreps[0]!) && (
        <div className="mt-2">
          <Segmented
            label={irreps.length === 2 ? 'Part of the square' : 'Part of the cube'}
            options={[
              { value: 'whole', label: irreps.length === 2 ? 'whole square' : 'whole cube' },
              { value: 'symmetric', label: 'symmetric' },
              { value: 'antisymmetric', label: 'antisymmetric' },
            ]}
            value={own ?? 'whole'}
            onChange={(next) => change({ part: next === 'whole' ? null : next })}
          />
        </div>
      )}
      <p role="status" className="mt-3 text-base">
        {error && <span className="text-sm text-alert">{error}</span>}
        {terms && (
          <>
            Γ = <IrrepSum terms={terms} className="whitespace-normal!" />
            {terms.length === 0 && <span className="text-sm text-ink-soft"> (this part vanishes)</span>}
          </>
        )}
      </p>
    </Panel>
  );
}

function labelsOf(symbol: string, double: boolean): { plain: string[]; spinors: string[] } {
  const group = findGroup(symbol)!;
  const spinors =
    double && group.order !== null
      ? doubleGroup(symbol).irreps.flatMap(({ label, spinor }) => (spinor ? [label] : []))
      : [];
  return { plain: group.irreps.map(({ label }) => label), spinors };
}

function reduced(group: string, irreps: readonly string[], part: SymmetryState['part']) {
  if (irreps.length === 0) return { terms: null, error: null };
  try {
    return { terms: part ? powerPart(group, irreps, part) : productOf(group, irreps), error: null };
  } catch (error) {
    if (error instanceof DomainError) return { terms: null, error: error.message };
    throw error;
  }
}
