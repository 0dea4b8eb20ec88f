import type { EntityReading } from '#src/chem/formula/index.ts';
import { Segmented } from '#src/components/ui/Segmented.tsx';
import { IsomerChoice } from '../register/IsomerChoice.tsx';
import { Part, SpinChoice } from '../register/SpinChoice.tsx';
import { type Choices, type Settled, subjectOf } from '../register/settle.ts';

interface IdentityChoicesProps {
  chemistry: typeof import('../register/chemistry.ts');
  entity: EntityReading;
  settled: Settled;
  onChoose: (choices: Choices) => void;
}

/** Geometry, isomer and spin state anew, as at registration. Records of several centres have none of these to choose. */
export function IdentityChoices({ chemistry, entity, settled, onChoose }: IdentityChoicesProps) {
  if (entity.centres.length > 1) return null;
  const { geometry, list, pick, spins, spinState } = settled;
  const of = subjectOf(entity);
  const shape = geometry === null ? null : chemistry.findGeometry(geometry);
  // Every part is told, so that the choice does not fall back to what a fresh registration would take.
  const present: Choices = { of, geometry, isomer: pick, spinState };
  const nameOf = (symbol: string) => chemistry.findGeometry(symbol)?.name ?? symbol;
  return (
    <>
      <Part title="Geometry">
        <Segmented
          label="Geometry"
          look="cards"
          options={[
            ...entity.geometries.map((symbol) => ({
              value: symbol,
              label: (
                <span>
                  {nameOf(symbol)}, <span className="num">{symbol}</span>
                </span>
              ),
            })),
            { value: 'none', label: 'not stated' },
          ]}
          value={geometry ?? 'none'}
          onChange={(chosen) => onChoose({ of, geometry: chosen === 'none' ? null : chosen })}
        />
      </Part>
      {shape && list && list.count > 0 && (
        <IsomerChoice
          key={geometry}
          list={list}
          geometry={shape}
          ligands={entity.ligands}
          pick={pick}
          onPick={(isomer) => onChoose({ ...present, isomer })}
          draw={chemistry.drawPolyhedron}
        />
      )}
      {spins.length > 1 && (
        <SpinChoice spins={spins} value={spinState} onChoose={(spin) => onChoose({ ...present, spinState: spin })} />
      )}
    </>
  );
}
