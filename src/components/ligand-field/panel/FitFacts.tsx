import type { FitCandidate } from '#src/chem/ligand-field/index.ts';
import { Quantity } from '#src/components/notation/index.tsx';
import { formatNumber } from '#src/components/notation/quantity.ts';
import { Facts } from '#src/components/ui/Panel.tsx';

const RATIO = {
  given: 'as given',
  'free ion': 'of the free ion',
  assumed: 'assumed',
  fitted: 'fitted',
} as const;

type Told = Pick<
  FitCandidate,
  'delta' | 'B' | 'C' | 'errors' | 'beta' | 'freeIon' | 'ratioCB' | 'ratioSource' | 'rms' | 'degreesOfFreedom'
>;

const whole = (value: number | null) => (value === null ? null : Math.round(value));

/** What a fit gave, with standard errors where they can be told. */
export function FitFacts({ fit }: { fit: Told }) {
  const { errors } = fit;
  const quantity = (value: number | null, error: number | null) =>
    value === null ? null : <Quantity value={whole(value)} uncertainty={error ?? undefined} unit="cm-1" figures={6} />;
  return (
    <div>
      <Facts
        facts={[
          [<i key="d">Δ</i>, quantity(fit.delta, errors.delta)],
          [<i key="b">B</i>, quantity(fit.B, errors.B)],
          [
            <i key="c">C</i>,
            fit.C === null ? null : (
              <>
                {quantity(fit.C, errors.C)}{' '}
                <span className="text-xs text-ink-soft">
                  <i>C</i>/<i>B</i> {formatNumber(fit.ratioCB, 3)}, {RATIO[fit.ratioSource]}
                </span>
              </>
            ),
          ],
          [
            'β',
            fit.beta === null || !fit.freeIon ? null : (
              <>
                <span className="num">{formatNumber(fit.beta, 2)}</span>{' '}
                <span className="text-xs text-ink-soft">
                  of {formatNumber(fit.freeIon.B, 4)} cm⁻¹ ({fit.freeIon.source})
                </span>
              </>
            ),
          ],
        ]}
      />
      {errors.delta === null && fit.degreesOfFreedom <= 0 && (
        <p className="mt-1.5 text-xs text-ink-soft">
          As many bands as parameters: without uncertainties of the bands no standard error can be told.
        </p>
      )}
    </div>
  );
}
