import type { ReactNode } from 'react';
import type { CentreReading, Reading } from '#src/chem/formula/index.ts';
import { DCount, Formula, OxidationState, Quantity } from '#src/components/notation/index.tsx';
import { isSalt, ligandText } from './reading.ts';

/** What the program reads in the formula, in one row. */
export function ReadingStrip({ reading }: { reading: Reading }) {
  const { entities, centres, ligands, coordinationNumber, molarMass } = reading;
  return (
    <dl className="panel flex flex-wrap gap-x-7 gap-y-3 border border-hairline bg-glaze px-[18px] py-3.5">
      <Fact name={entities.length > 1 ? 'Entities' : 'Entity'}>
        <InARow items={entities.map(({ entity }) => entity)}>
          {(entity) => <Formula formula={entity} className="text-base" />}
        </InARow>
      </Fact>
      <Fact name={centres.length > 1 ? 'Metals' : 'Metal'}>
        <InARow items={centres}>{(centre) => <Metal centre={centre} />}</InARow>
      </Fact>
      <Fact name="d-count">
        <InARow items={centres}>
          {({ dCount }) => (dCount === null ? '–' : <DCount count={dCount} className="text-base" />)}
        </InARow>
      </Fact>
      <Fact name="Coordination">{coordinationNumber ?? '–'}</Fact>
      <Fact name="Ligands">
        {ligands.length === 0 ? (
          'none'
        ) : (
          <InARow items={ligands}>
            {(ligand) => (
              <span title={ligand.name}>
                {ligand.count > 1 && `${ligand.count} `}
                <Formula formula={ligandText(ligand)} className="text-base" />
              </span>
            )}
          </InARow>
        )}
      </Fact>
      <Fact name={isSalt(reading) ? 'Salt, molar mass' : 'Molar mass'}>
        <Quantity value={molarMass} unit="g mol-1" figures={5} />
      </Fact>
    </dl>
  );
}

/** An oxidation state that is a convention says so. */
function Metal({ centre: { element, oxidationState, nominal } }: { centre: CentreReading }) {
  return (
    <>
      <OxidationState element={element} state={oxidationState} />
      {nominal && <span className="text-xs text-ink-soft"> nominal</span>}
    </>
  );
}

function Fact({ name, children }: { name: string; children: ReactNode }) {
  return (
    <div className="min-w-0">
      <dt className="text-xs text-ink-soft">{name}</dt>
      <dd className="min-h-6 text-base">{children}</dd>
    </div>
  );
}

function InARow<T>({ items, children }: { items: readonly T[]; children: (item: T) => ReactNode }) {
  return items.map((item, i) => (
    <span key={i}>
      {i > 0 && ', '}
      {children(item)}
    </span>
  ));
}
