import type { ChargeTransfer } from '#src/chem/charge-transfer/index.ts';
import { Formula, Term, Unit } from '#src/components/notation/index.tsx';
import { formatNumber } from '#src/components/notation/quantity.ts';

const signed = (value: number | null) =>
  value === null ? '–' : `${value < 0 ? '−' : value > 0 ? '+' : ''}${formatNumber(Math.abs(value), 7)}`;

const ORBITAL = { pi: 'π', sigma: 'σ' } as const;

/** LMCT estimates with the terms they are made of, MLCT judgements, and what kind of estimate all this is. */
export function ChargeTransferFacts({ told: { lmct, mlct, reasons } }: { told: ChargeTransfer }) {
  const plausible = mlct.filter((one) => one.plausible);
  const implausible = mlct.filter((one) => !one.plausible);
  return (
    <div className="flex flex-col gap-3">
      {lmct.length > 0 && (
        // biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reached with the keyboard
        <section className="-mx-[18px] overflow-x-auto" tabIndex={0} aria-label="LMCT estimates">
          <table className="table table-compact">
            <thead>
              <tr>
                <th scope="col" className="!pl-[18px]">
                  LMCT from
                </th>
                <th scope="col">into</th>
                <th scope="col" className="!text-right">
                  Estimate, <Unit unit="cm-1" />
                </th>
                <th scope="col" className="!text-right">
                  nm
                </th>
                <th scope="col" className="!text-right">
                  30 000 Δ<i>χ</i>
                </th>
                <th scope="col" className="!text-right">
                  Field
                </th>
                <th scope="col" className="!text-right">
                  Spin pairing
                </th>
              </tr>
            </thead>
            <tbody>
              {lmct.map((one) => (
                <tr key={one.ligand}>
                  <td className="!pl-[18px] text-ink">
                    <Formula formula={one.ligand} />{' '}
                    <span className="font-normal text-ink-soft">{ORBITAL[one.orbital]}</span>
                  </td>
                  <td>
                    <Term term={one.acceptor} />
                  </td>
                  <td className="num text-right">
                    {formatNumber(one.wavenumber, 7)} ± {formatNumber(one.usualError, 5)}
                  </td>
                  <td className="num text-right">{one.wavelength === null ? '–' : Math.round(one.wavelength)}</td>
                  <td className="num text-right">{signed(one.terms.electronegativity)}</td>
                  <td className="num text-right">{signed(one.terms.field)}</td>
                  <td className="num text-right">{signed(one.terms.spinPairing)}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </section>
      )}
      {plausible.length > 0 && (
        <ul className="flex flex-col gap-1">
          {plausible.map(({ ligand, reason }) => (
            <li key={ligand}>
              MLCT to <Formula formula={ligand} /> is plausible: <span className="text-ink-soft">{reason}</span>
            </li>
          ))}
        </ul>
      )}
      {implausible.length > 0 && (
        <p className="text-xs text-ink-soft">
          No MLCT is expected: {[...new Set(implausible.map(({ reason }) => reason))].join(' ')}
        </p>
      )}
      {reasons.length > 0 && <p className="max-w-[95ch] text-xs text-ink-soft">{reasons.join(' ')}</p>}
    </div>
  );
}
