import { curveLabel } from '#src/components/spectra/page/curves.ts';
import { Y_TITLES, type YUnit } from '#src/components/spectra/plot/units.ts';
import { TECHNIQUES } from '#src/components/spectra/words.ts';
import type { SpectrumSummary } from '#src/contracts/spectra.ts';
import { isOffAxis, looksAt } from './overlay.ts';
import type { Curve } from './useComplexPage.ts';

interface SpectraLegendProps {
  curves: readonly Curve[];
  shown: ReadonlySet<string>;
  yUnit: YUnit;
  onToggle: (id: string) => void;
}

/** Every spectrum with its lab and medium; a tick shows or hides its curve, its title opens it. */
export function SpectraLegend({ curves, shown, yUnit, onToggle }: SpectraLegendProps) {
  return (
    <ul aria-label="Spectra shown" className="mt-3 grid gap-x-6 border-t border-faint pt-2">
      {curves.map((one, place) => {
        const { spectrum, curve } = one;
        const { colour, dash } = looksAt(place);
        const isShown = shown.has(spectrum.id);
        return (
          <li key={spectrum.id} className="flex min-w-0 items-center gap-2.5 py-0.5">
            <input
              type="checkbox"
              checked={isShown}
              onChange={() => onToggle(spectrum.id)}
              aria-label={`Show ${spectrum.title}, ${curveLabel(spectrum)}`}
              className="m-1 size-4 flex-none accent-zaffre"
            />
            <svg width="22" height="6" aria-hidden="true" className={`flex-none ${isShown ? '' : 'opacity-35'}`}>
              <path d="M0 3H22" stroke={colour} strokeWidth="2" strokeDasharray={dash.join(' ') || undefined} />
            </svg>
            <a href={`/spectra/${spectrum.id}`} className="link min-w-0 truncate" title={spectrum.title}>
              {spectrum.title}
            </a>
            <span className="min-w-0 flex-1 truncate text-xs text-ink-soft">
              {curveLabel(spectrum)}
              {remarkOf(spectrum)}
              {isShown && curve && isOffAxis(one, yUnit) && ` · not drawn: gives ${Y_TITLES[curve.quantity].name}`}
            </span>
          </li>
        );
      })}
    </ul>
  );
}

const remarkOf = ({ technique, flags }: SpectrumSummary): string => {
  const parts = [
    technique === 'solution' ? null : TECHNIQUES[technique],
    flags.length === 0 ? null : flags.length === 1 ? '1 flag' : `${flags.length} flags`,
  ].filter(Boolean);
  return parts.length > 0 ? ` · ${parts.join(' · ')}` : '';
};
