import type { MeasuredRecord } from '../../contracts/people.ts';
import type { LabRecord } from '../../contracts/sharing.ts';
import { DataTable } from '../ui/DataTable.tsx';
import { Panel } from '../ui/Panel.tsx';
import type { DataColumn } from '../ui/table-csv.ts';

type Row = MeasuredRecord['elsewhere'][number];

const COLUMNS: DataColumn<Row>[] = [
  {
    id: 'lab',
    header: 'Lab',
    value: ({ lab }) => lab.name,
    cell: ({ lab }) => (
      <a href={`/labs/${lab.id}`} className="link">
        {lab.name}
      </a>
    ),
  },
  { id: 'spectra', header: 'Spectra', value: (row) => row.spectra, figures: true },
];

/** What a facility measured for the labs that made the preparations, and what others measured for this lab. */
export function LabMeasured({ lab, measured }: { lab: LabRecord; measured: MeasuredRecord }) {
  const { forOthers, elsewhere } = measured;
  return (
    <>
      {(lab.facility || forOthers.length > 0) && (
        <Panel title="Measured for other labs" aside={<SpectraOf lab={lab.id}>All spectra measured here</SpectraOf>}>
          {forOthers.length === 0 ? (
            <p className="text-ink-soft">No preparation of another lab was measured here yet, as far as you may see.</p>
          ) : (
            <Counts name="Measured for other labs" rows={forOthers} />
          )}
        </Panel>
      )}
      <Panel title="Measured elsewhere" aside="Preparations of this lab, by the lab that measured">
        {elsewhere.length === 0 ? (
          <p className="text-ink-soft">No other lab measured a preparation of this lab yet, as far as you may see.</p>
        ) : (
          <Counts name="Measured elsewhere" rows={elsewhere} isMeasurer />
        )}
      </Panel>
    </>
  );
}

function Counts({ name, rows, isMeasurer = false }: { name: string; rows: Row[]; isMeasurer?: boolean }) {
  return (
    <DataTable
      name={name}
      columns={COLUMNS}
      rows={rows}
      rowId={({ lab }) => lab.id}
      tools={rows.length > 8}
      compact
      {...(isMeasurer
        ? { actions: ({ lab }: Row) => <SpectraOf lab={lab.id}>All spectra measured there</SpectraOf> }
        : {})}
    />
  );
}

const SpectraOf = ({ lab, children }: { lab: string; children: string }) => (
  <a href={`/spectra?lab=${lab}`} className="link text-xs">
    {children}
  </a>
);
