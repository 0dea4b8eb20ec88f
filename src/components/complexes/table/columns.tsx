import { columnVisibilityFeature, createColumnHelper, rowSortingFeature, tableFeatures } from '@tanstack/react-table';
import { BandStrip } from '#src/components/marks/BandStrip.tsx';
import { Cuvette } from '#src/components/marks/Cuvette.tsx';
import { DCount, Formula, OxidationState, PointGroup, Quantity, Unit } from '#src/components/notation/index.tsx';
import { Chip } from '#src/components/ui/Chip.tsx';
import type { ComplexSummary } from '#src/contracts/complexes.ts';
import { longDescriptor, prefixedFormula } from '../prefixed-formula.ts';
import { type GeometryNames, spinWords } from './words.ts';

export const features = tableFeatures({ rowSortingFeature, columnVisibilityFeature });
const helper = createColumnHelper<typeof features, ComplexSummary>();

/** Columns that are there for who asks for them. */
export const HIDDEN_AT_FIRST = { charge: false, molarMass: false, donorSetGroup: false, lab: false, updated: false };

/** What the column is called in the list of columns; the head of the table may say it in marks. */
export const COLUMN_NAMES: Record<string, string> = {
  cuvette: 'Colour',
  accession: 'Accession',
  formula: 'Formula',
  metal: 'Metal',
  dCount: 'd-count',
  geometry: 'Geometry',
  pointGroup: 'Point group',
  donorSetGroup: 'Donor-set group',
  charge: 'Charge',
  molarMass: 'Molar mass',
  strip: 'Bands',
  lab: 'Home lab',
  labs: 'Labs that measured',
  spectra: 'Spectra',
  updated: 'Changed',
};

const NONE = '–';

/** The columns of the table, in order. */
export const complexColumns = (names: GeometryNames) =>
  helper.columns([
    helper.display({ id: 'cuvette', header: () => <span className="sr-only">Colour</span>, cell: Colour }),
    helper.accessor('accession', {
      header: 'Accession',
      cell: ({ row: { original } }) => (
        <>
          {/* The link covers its row, so that a click anywhere opens the complex. */}
          <a href={`/complexes/${original.accession}`} className="num no-underline after:absolute after:inset-0">
            {original.accession}
          </a>
          {original.state !== 'registered' && (
            <span className="ml-2 text-xs">
              <Chip>{original.state}</Chip>
            </span>
          )}
        </>
      ),
    }),
    helper.accessor('formula', {
      header: 'Formula',
      cell: ({ row: { original } }) => {
        const long = longDescriptor(original.isomer);
        return (
          <>
            <Formula formula={prefixedFormula(original.formula, original.isomer)} className="text-base" />
            {long && <span className="block max-w-56 truncate text-xs text-ink-soft">{long}</span>}
          </>
        );
      },
    }),
    helper.display({
      id: 'metal',
      header: 'Metal',
      cell: ({ row }) => (
        <Each complex={row.original}>
          {({ element, oxidationState }) => <OxidationState element={element} state={oxidationState.value} />}
        </Each>
      ),
    }),
    helper.display({
      id: 'dCount',
      header: 'd-count',
      cell: ({ row }) => (
        <Each complex={row.original}>
          {({ dCount, spinState }) =>
            dCount === null ? (
              NONE
            ) : (
              <>
                <DCount count={dCount} /> {spinState && spinWords(spinState)}
              </>
            )
          }
        </Each>
      ),
    }),
    helper.display({
      id: 'geometry',
      header: 'Geometry',
      cell: ({ row }) => (
        <Each complex={row.original}>
          {({ geometry }) => (geometry === null ? NONE : (names[geometry] ?? geometry))}
        </Each>
      ),
    }),
    helper.accessor('pointGroup', {
      header: 'Group',
      cell: ({ getValue }) => <Group group={getValue()} />,
    }),
    helper.accessor('donorSetGroup', {
      header: 'Donor set',
      cell: ({ getValue }) => <Group group={getValue()} />,
    }),
    helper.accessor('charge', {
      header: 'Charge',
      cell: ({ getValue }) => <span className="num">{chargeText(getValue())}</span>,
    }),
    helper.accessor('molarMass', {
      header: () => (
        <>
          <i>M</i> / <Unit unit="g mol-1" />
        </>
      ),
      cell: ({ getValue }) => <Quantity value={getValue()} figures={5} />,
    }),
    helper.display({
      id: 'strip',
      header: () => (
        <>
          Bands, 50 000 – 4 000 <Unit unit="cm-1" />
        </>
      ),
      cell: ({ row }) => (
        <span className="relative z-10">
          <BandStrip bands={row.original.strip} />
        </span>
      ),
    }),
    helper.accessor((row) => row.lab.name, { id: 'lab', header: 'Home lab' }),
    helper.accessor('labs', { header: 'Labs', cell: ({ getValue }) => <span className="num">{getValue()}</span> }),
    helper.accessor('spectra', {
      header: 'Spectra',
      cell: ({ getValue }) => <span className="num">{getValue()}</span>,
    }),
    helper.accessor((row) => row.updatedAt, {
      id: 'updated',
      header: 'Changed',
      cell: ({ getValue }) => <span className="num">{getValue().slice(0, 10)}</span>,
    }),
  ]);

/** Columns the server orders by. */
export const SORTABLE = new Set([
  'accession',
  'formula',
  'metal',
  'dCount',
  'geometry',
  'pointGroup',
  'labs',
  'spectra',
  'updated',
]);

const chargeText = (charge: number) =>
  charge === 0 ? '0' : `${Math.abs(charge) === 1 ? '' : Math.abs(charge)}${charge > 0 ? '+' : '−'}`;

function Colour({ row: { original } }: { row: { original: ComplexSummary } }) {
  const { colour } = original;
  const title = colour
    ? `Solution, ${colour}, diluted to a highest visible absorbance of 1`
    : 'No spectrum tells the colour';
  return (
    <span className="relative z-10">
      <Cuvette colour={colour} title={title} />
    </span>
  );
}

const Group = ({ group }: { group: string | null }) =>
  group === null ? <span title="not stated">{NONE}</span> : <PointGroup group={group} />;

/** One value a centre; equal ones once. */
function Each({
  complex,
  children,
}: {
  complex: ComplexSummary;
  children: (centre: ComplexSummary['centres'][number]) => React.ReactNode;
}) {
  const seen = new Set<string>();
  const centres = complex.centres.filter((centre) => {
    const key = [centre.element, centre.oxidationState.value, centre.dCount, centre.spinState, centre.geometry].join();
    return !seen.has(key) && seen.add(key);
  });
  return centres.map((centre, i) => (
    <span key={`${centre.element} ${i}`}>
      {i > 0 && ', '}
      {children(centre)}
    </span>
  ));
}
