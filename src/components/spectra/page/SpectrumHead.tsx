import type { ReactNode } from 'react';
import { Cuvette } from '#src/components/marks/Cuvette.tsx';
import { Formula } from '#src/components/notation/index.tsx';
import type { SpectrumRecord } from '#src/contracts/spectra.ts';
import { mediumText, TECHNIQUES } from '../words.ts';

/** What spectrum this is, of what, and what can be done with it. */
export function SpectrumHead({ spectrum, children }: { spectrum: SpectrumRecord; children: ReactNode }) {
  const { title, complex, formula, lab, technique, colour } = spectrum;
  const facts = [lab.name, TECHNIQUES[technique], mediumText(spectrum)].filter(Boolean);
  return (
    <header className="specimen flex flex-wrap items-center gap-x-5 gap-y-3 px-[18px] py-3.5">
      <Cuvette
        colour={colour}
        title={colour ? `Solution at peak visible absorbance 1, ${colour}` : 'The spectrum tells no colour'}
        scale={1.8}
      />
      <div className="min-w-0 flex-1 basis-72">
        <h1 className="text-lg font-semibold break-words">{title}</h1>
        <p>
          <a href={`/complexes/${complex}`} className="link">
            <Formula formula={formula} className="text-base" />
          </a>{' '}
          <span className="num text-ink-soft">{complex}</span>
        </p>
        <p className="text-xs text-ink-soft">{facts.join(' · ')}</p>
      </div>
      <div className="no-print flex flex-wrap items-center gap-2">{children}</div>
    </header>
  );
}
