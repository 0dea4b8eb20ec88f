import { useCallback, useState } from 'react';
import { Button } from '#src/components/ui/Button.tsx';
import { Dialog } from '#src/components/ui/Dialog.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import { Progress } from '#src/components/ui/Progress.tsx';
import { saveText } from '#src/components/ui/save-text.ts';
import { allPages } from './pages.ts';
import { csvColumns } from './table-csv.ts';
import { fetchComplexes } from './useComplexes.ts';
import { useTask } from './useTask.ts';
import { type ComplexView, filterSearch } from './view.ts';
import type { GeometryNames } from './words.ts';

/** The whole filtered list as a CSV file, read page by page. */
export function DownloadTable({ view, names }: { view: ComplexView; names: GeometryNames }) {
  const [isOpen, setIsOpen] = useState(false);
  const work = useCallback(
    async (signal: AbortSignal, onProgress: (share: number) => void) => {
      const search = filterSearch(view);
      search.set('sort', view.sort);
      const all = await allPages(fetchComplexes(search, signal), (done, total) => onProgress(done / total));
      const { tableCsv } = await import('#src/components/ui/table-csv.ts');
      signal.throwIfAborted();
      // The byte order mark tells a spreadsheet that the file is UTF-8.
      saveText('complexes.csv', `\uFEFF${tableCsv(csvColumns(names), all)}`, 'text/csv;charset=utf-8');
      setIsOpen(false);
    },
    [view, names],
  );
  const { state, progress, problem, start, cancel } = useTask(work);
  const close = () => {
    cancel();
    setIsOpen(false);
  };
  return (
    <>
      <Button
        onClick={() => {
          setIsOpen(true);
          start();
        }}
      >
        Download table
      </Button>
      <Dialog
        open={isOpen}
        onOpenChange={(open) => !open && close()}
        title="Download table"
        description="Every complex that matches the filters, as CSV with all columns."
      >
        {state === 'running' && <Progress label="Reading the list" value={progress} onCancel={close} />}
        <Problem problem={problem} onRetry={start} />
      </Dialog>
    </>
  );
}
