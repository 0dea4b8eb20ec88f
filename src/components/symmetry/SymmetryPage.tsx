import { Panel } from '#src/components/ui/Panel.tsx';
import { CharacterTable } from './CharacterTable.tsx';
import { DescentPanel } from './DescentPanel.tsx';
import { GroupPicker } from './GroupPicker.tsx';
import { ProductPanel } from './ProductPanel.tsx';
import { SelectionPanel } from './SelectionPanel.tsx';
import { SplittingPanel } from './SplittingPanel.tsx';
import { useSymmetryState } from './useSymmetryState.ts';
import { VibrationsPanel } from './VibrationsPanel.tsx';
import { WhenNear } from './WhenNear.tsx';

/** A panel that waits until it is scrolled to, as its derivation takes a while. */
const later = (title: string) => (
  <Panel title={title}>
    <p className="min-h-64 text-ink-soft">To be worked out once it comes into sight.</p>
  </Panel>
);

/** Point groups at work: table, products, splitting, descent, selection and vibrations, all told by the address. */
export function SymmetryPage({ search }: { search: string }) {
  const { state, change, choose } = useSymmetryState(search);
  const props = { state, change };
  return (
    <div className="grid items-start gap-6 lg:grid-cols-[268px_minmax(0,1fr)]">
      <aside className="min-w-0 lg:sticky lg:top-4">
        <Panel title="Group">
          <GroupPicker group={state.group} onChoose={choose} />
        </Panel>
      </aside>
      <div className="grid min-w-0 grid-cols-[minmax(0,1fr)] gap-5">
        <CharacterTable
          group={state.group}
          double={state.double}
          onDouble={(double) => change({ double, irreps: [] })}
        />
        <div className="grid items-start gap-5 md:grid-cols-2">
          <ProductPanel {...props} />
          <SplittingPanel {...props} />
        </div>
        <WhenNear waiting={later('Descent')}>{() => <DescentPanel {...props} choose={choose} />}</WhenNear>
        <div id="selection" className="min-w-0">
          <WhenNear waiting={later('Selection')}>{() => <SelectionPanel {...props} />}</WhenNear>
        </div>
        <WhenNear waiting={later('Vibrations')}>{() => <VibrationsPanel {...props} choose={choose} />}</WhenNear>
      </div>
    </div>
  );
}
