import { useQuery } from '@tanstack/react-query';
import type { FolioReader } from '../../contracts/oversight.ts';
import { DataTable } from '../ui/DataTable.tsx';
import { minute, shortDay } from '../ui/dates.ts';
import { getJson } from '../ui/http.ts';
import { Panel } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { queryClient } from '../ui/query-client.ts';
import type { DataColumn } from '../ui/table-csv.ts';

const last = (instant: string | null, times: number) =>
  instant === null ? (
    <span className="text-ink-soft">never</span>
  ) : (
    <>
      {minute(instant)}
      {times > 1 && <span className="text-ink-soft">, {times} times in all</span>}
    </>
  );

const COLUMNS: DataColumn<FolioReader>[] = [
  { id: 'name', header: 'Name', value: ({ account }) => account.name },
  { id: 'email', header: 'Address', value: ({ account }) => account.email },
  {
    id: 'look',
    header: 'Last looked',
    value: ({ lastLook }) => lastLook,
    cell: ({ lastLook, looks }) => last(lastLook, looks),
  },
  {
    id: 'download',
    header: 'Last downloaded',
    value: ({ lastDownload }) => lastDownload,
    cell: ({ lastDownload, downloads, level }) =>
      lastDownload === null && level === 'view' ? (
        <span className="text-ink-soft">may only read</span>
      ) : (
        last(lastDownload, downloads)
      ),
  },
  {
    id: 'until',
    header: 'Access',
    value: ({ ended, expires }) => (ended ? 'ended' : expires.slice(0, 10)),
    cell: ({ ended, expires }) => (ended ? 'ended' : `until ${shortDay(expires)}`),
  },
];

/** For leads of its lab and stewards: when each guest of a folio last looked at it, and last took a file away. */
export function FolioReadersLog({ folioId }: { folioId: string }) {
  const { data, error, refetch } = useQuery(
    {
      queryKey: ['folio-readers', folioId],
      queryFn: ({ signal }) => getJson<FolioReader[]>(`/api/access-log/readers?folio=${folioId}`, signal),
    },
    queryClient,
  );
  return (
    <Panel
      title="Looked and downloaded"
      aside={
        <a href={`/trail?view=looked&folio=${folioId}`} className="link">
          Day by day
        </a>
      }
    >
      <Problem problem={error} onRetry={() => void refetch()} />
      {!data && !error && (
        <p role="status" className="text-ink-soft">
          Reading…
        </p>
      )}
      {data?.length === 0 && <p className="text-ink-soft">No guest was ever given access.</p>}
      {data && data.length > 0 && (
        <DataTable
          name="Looked and downloaded"
          columns={COLUMNS}
          rows={data}
          rowId={({ account }) => account.id}
          sort="-look"
          tools={data.length > 8}
          compact
        />
      )}
    </Panel>
  );
}
