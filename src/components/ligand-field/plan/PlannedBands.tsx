import type { SolutionColour } from '#src/chem/colour/index.ts';
import type { Plan } from '#src/chem/planning/index.ts';
import { Cuvette } from '#src/components/marks/Cuvette.tsx';
import { DCount, Formula, Quantity, Term, Unit } from '#src/components/notation/index.tsx';
import { formatNumber, groupDigits } from '#src/components/notation/quantity.ts';
import { Panel } from '#src/components/ui/Panel.tsx';

/** A limit of ε to two figures, as such limits deserve. */
export const rough = (value: number): string => groupDigits(String(Number(value.toPrecision(2))));

/** Whether a cubic field of this d-count has two spin states. */
const hasSpinChoice = (dCount: number, geometry: string): boolean =>
  geometry === 'T-4' ? dCount >= 3 && dCount <= 6 : dCount >= 4 && dCount <= 7;

interface PlannedBandsProps {
  plan: Plan;
  geometry: string;
  colour: SolutionColour | null;
}

/** Bands to be expected, with their usual strength and how they were come by. */
export function PlannedBands({ plan, geometry, colour }: PlannedBandsProps) {
  const { bands, delta, B, dCount, ground, spin, reasons } = plan;
  return (
    <Panel
      flush
      title="Bands to be expected"
      aside={
        <span className="flex items-center gap-3">
          <span>
            <DCount count={dCount} />, {geometry}
            {ground && (
              <>
                , <Term term={ground} />
              </>
            )}
            {spin && hasSpinChoice(dCount, geometry) && `, ${spin} spin`}
          </span>
          {delta !== null && (
            <span>
              <i>Δ</i> <Quantity value={delta} unit="cm-1" figures={5} />
            </span>
          )}
          {B !== null && (
            <span>
              <i>B</i> <Quantity value={B} unit="cm-1" figures={4} />
            </span>
          )}
          {colour && (
            <Cuvette
              colour={colour.hex}
              title={`${colour.name}, ${colour.hex}: of Gaussians of the typical strength, at peak visible absorbance 1`}
            />
          )}
        </span>
      }
    >
      {bands.length === 0 ? (
        <p className="px-[18px] pb-1 text-ink-soft">No band can be placed; the reasons are below.</p>
      ) : (
        <div className="overflow-x-auto border-t border-hairline">
          <table className="table table-compact">
            <thead>
              <tr>
                <th scope="col" className="!pl-[18px]">
                  Kind
                </th>
                <th scope="col">To</th>
                <th scope="col" className="!text-right">
                  <Unit unit="cm-1" />
                </th>
                <th scope="col" className="!text-right">
                  nm
                </th>
                <th scope="col">Spin</th>
                <th scope="col" className="!text-right">
                  <i>ε</i>, usual limits, <Unit unit="dm3 mol-1 cm-1" />
                </th>
              </tr>
            </thead>
            <tbody>
              {bands.map((band, i) => (
                <tr key={i} className={band.spinAllowed ? '' : 'text-ink-soft'}>
                  <td className="!pl-[18px]">{band.kind === 'd-d' ? 'd–d' : 'LMCT'}</td>
                  <td className="text-ink">
                    {band.kind === 'd-d' ? (
                      <Term term={band.to} />
                    ) : (
                      <>
                        from <Formula formula={band.to} />
                      </>
                    )}
                  </td>
                  <td className="num text-right">{formatNumber(band.wavenumber, 6)}</td>
                  <td className="num text-right">{Math.round(band.wavelength)}</td>
                  <td className="text-xs">{band.spinAllowed ? 'allowed' : 'forbidden'}</td>
                  <td className="num text-right">
                    {rough(band.epsilon.from)} – {rough(band.epsilon.to)}
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
      <div className="border-t border-faint px-[18px] py-3 text-xs text-ink-soft">
        {reasons.map((reason) => (
          <p key={reason} className="max-w-[95ch]">
            {reason}
          </p>
        ))}
        {bands[0] && (
          <p className="max-w-[95ch]">
            Usual limits of ε: {[...new Set(bands.map((b) => b.epsilon.source))].join('; ')}.
          </p>
        )}
      </div>
    </Panel>
  );
}
