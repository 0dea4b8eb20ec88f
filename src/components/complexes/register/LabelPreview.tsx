import type { ReactNode } from 'react';
import type { EntityReading } from '#src/chem/formula/index.ts';
import { Formula, PointGroup, Quantity, Term } from '#src/components/notation/index.tsx';
import { Facts } from '#src/components/ui/Panel.tsx';
import { longDescriptor, prefixedFormula } from '../prefixed-formula.ts';
import { centreSentence, type Relative } from './label-facts.ts';
import type { Settled } from './settle.ts';

interface LabelPreviewProps {
  entity: EntityReading;
  settled: Settled;
  geometryName: (symbol: string) => string;
  relatives: { found: readonly Relative[] | null; isAsking: boolean; failed: boolean };
  children: ReactNode;
}

/** The specimen label as it would be, with what the program follows from it. */
export function LabelPreview({ entity, settled, geometryName, relatives, children }: LabelPreviewProps) {
  const { isomer, chirality, geometry, groundTerm } = settled;
  const stated = { descriptor: isomer?.descriptor ?? null, chirality };
  const long = longDescriptor(stated);
  const dCount = entity.centres.length === 1 ? (entity.centres[0]?.dCount ?? null) : null;
  return (
    <section aria-label="Specimen label" className="specimen px-[18px] pt-3.5 pb-[18px]">
      <p className="text-ink-soft">not yet registered</p>
      <p className="mt-0.5 text-lg font-semibold break-words">
        <Formula formula={prefixedFormula(entity.entity, stated)} className="whitespace-normal!" />
      </p>
      {long && <p className="text-xs text-ink-soft">{long}</p>}
      <div className="mt-3">
        <Facts
          facts={[
            ['Entity', <Quantity key="m" value={entity.molarMass} unit="g mol-1" figures={5} />],
            ['Geometry', geometry === null ? 'not stated' : geometryName(geometry)],
            groundTerm && [
              'Ground term',
              <span key="t">
                <Term term={groundTerm.label} /> <span className="text-ink-soft">in</span>{' '}
                <PointGroup group={groundTerm.group} />
              </span>,
            ],
            ['Framework', isomer ? <PointGroup group={isomer.pointGroup} /> : 'not known: isomer not stated'],
            isomer && ['Donor set', <PointGroup key="d" group={isomer.donorSetGroup} />],
            ['Centre', centreSentence(isomer?.pointGroup ?? null, dCount)],
            ['Already here?', <Relatives key="r" {...relatives} />],
          ]}
        />
      </div>
      <div className="mt-4">{children}</div>
    </section>
  );
}

function Relatives({ found, isAsking, failed }: LabelPreviewProps['relatives']) {
  if (failed) return 'could not be asked; registering will tell';
  if (isAsking || !found) return <span className="text-ink-soft">looking</span>;
  const [first, ...others] = found;
  if (!first) return 'no';
  const siblings = first.same ? others : found;
  return (
    <>
      {first.same ? (
        <b className="font-semibold text-alert">
          yes: <Accession {...first} />
        </b>
      ) : (
        'no'
      )}
      {siblings.length > 0 && (
        <>
          {'; '}
          {siblings.map((one, i) => (
            <span key={one.accession}>
              {i > 0 && '; '}
              {one.what} is <Accession {...one} />
            </span>
          ))}
        </>
      )}
    </>
  );
}

const Accession = ({ accession }: { accession: string }) => (
  <a href={`/complexes/${accession}`} className="link num whitespace-nowrap">
    {accession}
  </a>
);
