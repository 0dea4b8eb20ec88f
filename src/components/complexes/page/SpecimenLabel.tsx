import { useMemo } from 'react';
import type { LigandReading } from '#src/chem/formula/index.ts';
import { drawPolyhedron, findGeometry } from '#src/chem/geometry/index.ts';
import { Cuvette } from '#src/components/marks/Cuvette.tsx';
import { Polyhedron } from '#src/components/marks/Polyhedron.tsx';
import { DCount, Formula, OxidationState, Quantity } from '#src/components/notation/index.tsx';
import { CopyButton } from '#src/components/spectra/bands/CopyButton.tsx';
import { GroupLink, TermLink } from '#src/components/symmetry/GroupLink.tsx';
import { Facts } from '#src/components/ui/Panel.tsx';
import type { ComplexRecord } from '#src/contracts/complexes.ts';
import { longDescriptor, prefixedFormula } from '../prefixed-formula.ts';
import { siteLetters } from '../register/site-letters.ts';
import { BASES, centreKinds, geometryWord, visibilityText } from './specimen.ts';

interface SpecimenLabelProps {
  complex: ComplexRecord;
  /** Ligands as the formula reads, for the letters of the donors. */
  ligands: readonly LigandReading[];
}

/** The identity of a complex: what it is, what it looks like, and what follows from its formula. */
export function SpecimenLabel({ complex, ligands }: SpecimenLabelProps) {
  const long = longDescriptor(complex.isomer);
  return (
    <section aria-label="Specimen label" className="specimen px-[18px] pt-3.5 pb-[18px]">
      <p className="flex items-center gap-2 text-ink-soft">
        <span className="num">{complex.accession}</span>
        <CopyButton text={complex.accession} what="accession" />
      </p>
      <h1 className="mt-0.5 text-lg font-semibold break-words">
        <Formula formula={prefixedFormula(complex.formula, complex.isomer)} className="whitespace-normal!" />
      </h1>
      {long && <p className="text-xs text-ink-soft">{long}</p>}
      <div className="mt-3 flex flex-col gap-4 sm:max-lg:flex-row sm:max-lg:gap-8">
        <Looks complex={complex} ligands={ligands} />
        <Identity complex={complex} />
      </div>
    </section>
  );
}

/** The polyhedron, lettered once the isomer is stated, and the colour of the solution. */
function Looks({ complex, ligands }: SpecimenLabelProps) {
  const { isomer, colour } = complex;
  const [centre, ...others] = complex.centres;
  const symbol = others.length === 0 ? (centre?.geometry ?? null) : null;
  const shape = symbol === null ? null : findGeometry(symbol);
  const drawing = useMemo(
    () => shape && drawPolyhedron(shape, isomer.chelates ?? [], { size: 112 }),
    [shape, isomer.chelates],
  );
  const { letters, key } = useMemo(() => siteLetters(isomer.sites ?? [], ligands), [isomer.sites, ligands]);
  const stated = [isomer.chirality, isomer.descriptor].filter(Boolean).join(', ');
  return (
    <div className="flex-none">
      <div className="flex items-center gap-5">
        {drawing && shape && (
          <Polyhedron
            drawing={drawing}
            {...(isomer.sites ? { sites: letters } : {})}
            title={stated ? `${shape.name}, ${stated}` : shape.name}
          />
        )}
        <div className="flex items-center gap-3">
          <Cuvette
            colour={colour}
            title={colour ? `Solution, ${colour}` : 'No spectrum tells the colour'}
            scale={2.6}
          />
          <p className="text-xs text-ink-soft">
            {colour ? (
              <>
                colour at peak
                <br />
                visible <i>A</i> = 1<br />
                <span className="num text-ink uppercase">{colour}</span>
              </>
            ) : (
              <>
                no spectrum
                <br />
                tells the colour
              </>
            )}
          </p>
        </div>
      </div>
      {key.length > 0 && (
        <p className="mt-1 flex flex-wrap gap-x-3 text-xs text-ink-soft">
          {key.map(({ letter, ligand }) => (
            <span key={letter}>
              <span className="num text-ink">{letter}</span> of <Formula formula={ligand} />
            </span>
          ))}
        </p>
      )}
      {drawing && !isomer.sites && <p className="mt-1 text-xs text-ink-soft">isomer not stated</p>}
    </div>
  );
}

function Identity({ complex }: { complex: ComplexRecord }) {
  const { centres, ligands, isomer, pointGroup, donorSetGroup, effectiveGroup, siblings } = complex;
  const kinds = centreKinds(centres);
  const several = kinds.length > 1;
  return (
    <Facts
      facts={[
        ...kinds.flatMap(({ centre, count }) => centreFacts(centre, count, several)),
        [
          'Point group',
          pointGroup === null ? (
            'not known: isomer not stated'
          ) : (
            <span key="g">
              <GroupLink group={pointGroup} /> <span className="text-ink-soft">framework</span>
              {donorSetGroup && (
                <>
                  {', '}
                  <GroupLink group={donorSetGroup} /> <span className="text-ink-soft">donor set</span>
                </>
              )}
              {effectiveGroup && (
                <>
                  {', '}
                  <GroupLink group={effectiveGroup} /> <span className="text-ink-soft">effective</span>
                </>
              )}
            </span>
          ),
        ],
        [
          'Ligands',
          <span key="l">
            {ligands.map(({ abbreviation, count }, i) => (
              <span key={abbreviation}>
                {i > 0 && ', '}
                {count > 1 && `${count} `}
                <Formula formula={abbreviation} />
              </span>
            ))}
          </span>,
        ],
        ['Entity', <Quantity key="m" value={complex.molarMass} unit="g mol-1" figures={5} />],
        ['Composition', <Formula key="h" formula={complex.hill} />],
        complex.extent === 'discrete' ? null : ['Extent', `${complex.extent}; values are of a repeat unit`],
        ['Home lab', complex.lab.name],
        ['State', complex.state],
        [complex.state === 'draft' ? 'Once registered' : 'Seen by', visibilityText(complex)],
        siblings.length > 0 ? ['Siblings', <Siblings key="s" siblings={siblings} own={isomer} />] : null,
        complex.notes
          ? [
              'Notes',
              <span key="n" className="whitespace-pre-line">
                {complex.notes}
              </span>,
            ]
          : null,
      ]}
    />
  );
}

type Fact = readonly [name: React.ReactNode, value: React.ReactNode] | null;

function centreFacts(centre: ComplexRecord['centres'][number], count: number, several: boolean): Fact[] {
  const { element, group, oxidationState, dCount, geometry, geometryBasis, spinState, groundTerm } = centre;
  const shape = geometry === null ? null : findGeometry(geometry);
  const name = several ? `Metal ${element}` : 'Metal';
  return [
    [
      name,
      <span key="m">
        {count > 1 && `${count} × `}
        <OxidationState element={element} state={oxidationState.value} />
        {group !== null && `, group ${group}`}
        {oxidationState.nominal && <span className="text-ink-soft"> (nominal)</span>}
      </span>,
    ],
    dCount === null
      ? ['d-count', 'not given by the formula']
      : [
          'd-count',
          <span key="d">
            <DCount count={dCount} />
            {spinState && `, ${spinState === 'crossover' ? 'spin crossover' : `${spinState} spin`}`}
          </span>,
        ],
    [
      'Geometry',
      geometry === null ? (
        BASES[geometryBasis] === 'assumed' ? (
          'not stated'
        ) : (
          BASES[geometryBasis]
        )
      ) : (
        <span key="g">
          {geometryWord(geometry, shape?.name ?? geometry)}, <span className="num">{geometry}</span>
          {geometryBasis !== 'found' && <span className="text-ink-soft"> ({BASES[geometryBasis]})</span>}
        </span>
      ),
    ],
    groundTerm && [
      'Ground term',
      <span key="t">
        <TermLink term={groundTerm.label} group={groundTerm.group} /> <span className="text-ink-soft">in</span>{' '}
        <GroupLink group={groundTerm.group} />
      </span>,
    ],
  ];
}

function Siblings({ siblings, own }: { siblings: ComplexRecord['siblings']; own: ComplexRecord['isomer'] }) {
  return (
    <ul>
      {siblings.map(({ accession, descriptor, chirality }) => {
        const form = [chirality, descriptor].filter(Boolean).join('-');
        return (
          <li key={accession}>
            <a href={`/complexes/${accession}`} className="link num">
              {accession}
            </a>{' '}
            <span className="text-xs text-ink-soft">
              {form || (own.descriptor || own.chirality ? 'isomer not stated' : 'another geometry')}
            </span>
          </li>
        );
      })}
    </ul>
  );
}
