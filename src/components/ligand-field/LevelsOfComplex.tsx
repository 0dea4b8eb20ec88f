import { lazy, Suspense } from 'react';
import { WhenNear } from '#src/components/symmetry/WhenNear.tsx';
import { Panel } from '#src/components/ui/Panel.tsx';
import type { LevelPanelProps } from './panel/LevelPanel.tsx';

const LevelPanel = lazy(() => import('./panel/LevelPanel.tsx').then((module) => ({ default: module.LevelPanel })));

const waiting = (
  <Panel title="Level diagram">
    <p className="min-h-64 text-ink-soft">The levels are being worked out.</p>
  </Panel>
);

/** The level diagram of the page of a complex; its code comes once it is scrolled to. */
export function LevelsOfComplex(props: LevelPanelProps) {
  return (
    <WhenNear waiting={waiting}>
      {() => (
        <Suspense fallback={waiting}>
          <LevelPanel {...props} />
        </Suspense>
      )}
    </WhenNear>
  );
}
