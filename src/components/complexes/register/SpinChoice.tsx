import type { SpinChoice as Spin } from '#src/chem/electrons.ts';
import { Segmented } from '#src/components/ui/Segmented.tsx';
import type { SpinPick } from './settle.ts';

interface SpinChoiceProps {
  spins: readonly Spin[];
  value: SpinPick;
  onChoose: (spin: SpinPick) => void;
}

/** The spin states the centre can take; asked only where there is more than one. */
export function SpinChoice({ spins, value, onChoose }: SpinChoiceProps) {
  const stated = spins.map(({ spin, unpaired }) => ({
    value: spin as string,
    label: spin === 'intermediate' ? `intermediate, ${unpaired} unpaired` : `${spin} spin, ${unpaired} unpaired`,
  }));
  return (
    <Part title="Spin state" note="not part of the identity; it can be stated later">
      <Segmented
        label="Spin state"
        look="cards"
        options={[...stated, { value: 'crossover', label: 'crossover' }, { value: 'none', label: 'not known' }]}
        value={value ?? 'none'}
        onChange={(chosen) => onChoose(chosen === 'none' ? null : (chosen as SpinPick))}
      />
    </Part>
  );
}

/** A part of the registration under its heading. */
export function Part({ title, note, children }: { title: string; note?: string; children: React.ReactNode }) {
  return (
    <section>
      <h2 className="mb-2 flex flex-wrap items-baseline gap-x-3">
        <span className="text-base font-semibold">{title}</span>
        {note && <span className="text-xs font-normal text-ink-soft">{note}</span>}
      </h2>
      {children}
    </section>
  );
}
