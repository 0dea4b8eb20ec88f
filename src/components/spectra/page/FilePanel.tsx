import { Download } from 'lucide-react';
import { useState } from 'react';
import { formatNumber } from '#src/components/notation/quantity.ts';
import { Button, ButtonLink } from '#src/components/ui/Button.tsx';
import { Facts, Panel } from '#src/components/ui/Panel.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import { saveText } from '#src/components/ui/save-text.ts';
import type { SpectrumRecord } from '#src/contracts/spectra.ts';
import { CopyButton } from '../bands/CopyButton.tsx';
import { type DialectTold, dialectText } from '../upload/reading.ts';
import { UNIT_WORDS } from '../words.ts';
import { csvOf } from './csv.ts';

/** Bytes as people say them. */
const sizeText = (bytes: number) =>
  bytes < 1000
    ? `${bytes} bytes`
    : bytes < 1e6
      ? `${formatNumber(bytes / 1000, 3)} kB`
      : `${formatNumber(bytes / 1e6, 3)} MB`;

/** The file as it came, how it was read, and how to take it away. */
export function FilePanel({ spectrum }: { spectrum: SpectrumRecord }) {
  const { id, fileName, size, sha256, reading, xUnit, yUnit, block, column, may } = spectrum;
  const dialect = (reading.dialect as DialectTold | undefined) ?? null;
  const told = Object.keys((reading.told as object | undefined) ?? {});
  return (
    <Panel title="File">
      <Facts
        facts={[
          ['Name', <span className="break-all">{fileName}</span>],
          ['Size', sizeText(size)],
          [
            'SHA-256',
            <span className="flex items-start gap-2">
              <span className="num min-w-0 text-xs break-all">{sha256}</span>
              <CopyButton text={sha256} what="the checksum" />
            </span>,
          ],
          [
            'Read as',
            reading.format === 'jcamp-dx' ? 'JCAMP-DX' : (dialect && dialectText(dialect)) || 'text in columns',
          ],
          ['Abscissa', UNIT_WORDS[xUnit] ?? xUnit],
          ['Ordinate', UNIT_WORDS[yUnit] ?? yUnit],
          block > 0 || column > 0 ? ['Place', `spectrum ${block + 1} of the file`] : null,
          told.length > 0 ? ['Told by a person', told.map((name) => TOLD[name] ?? name).join(', ')] : null,
        ]}
      />
      {may.download ? (
        <div className="no-print mt-3 flex flex-wrap gap-2">
          <ButtonLink size="small" href={`/api/spectra/${id}/file`} download>
            <Download aria-hidden="true" size={14} />
            Original
          </ButtonLink>
          <ButtonLink size="small" href={`/api/spectra/${id}/jcamp`} download>
            <Download aria-hidden="true" size={14} />
            JCAMP-DX
          </ButtonLink>
          <CsvButton spectrum={spectrum} />
        </div>
      ) : (
        <p className="mt-3 text-xs text-ink-soft">
          Your access is for reading; ask the lab of the folio for downloads.
        </p>
      )}
    </Panel>
  );
}

const TOLD: Record<string, string> = {
  columns: 'columns',
  xUnit: 'unit of the abscissa',
  yUnit: 'quantity of the ordinate',
  decimalComma: 'decimal sign',
  delimiter: 'delimiter',
  skipLines: 'lines left out',
};

function CsvButton({ spectrum }: { spectrum: SpectrumRecord }) {
  const [isBusy, setIsBusy] = useState(false);
  const [problem, setProblem] = useState<unknown>(null);
  const [note, setNote] = useState('');
  const take = async () => {
    setIsBusy(true);
    setProblem(null);
    try {
      const { text, isThinned } = await csvOf(spectrum);
      saveText(`${spectrum.fileName.replace(/\.\w{1,5}$/, '')}.csv`, text, 'text/csv;charset=utf-8');
      setNote(isThinned ? 'The curve has more points than one request gives: the CSV is thinned.' : '');
    } catch (error) {
      setProblem(error);
    } finally {
      setIsBusy(false);
    }
  };
  return (
    <>
      <Button size="small" disabled={isBusy} onClick={() => void take()}>
        <Download aria-hidden="true" size={14} />
        CSV
      </Button>
      {note && (
        <p role="status" className="w-full text-xs">
          {note}
        </p>
      )}
      <Problem problem={problem} />
    </>
  );
}
