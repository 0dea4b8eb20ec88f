import { Select } from '#src/components/ui/controls.tsx';
import type { ReadingOptions } from '#src/contracts/spectra.ts';
import { UNIT_WORDS } from '../words.ts';
import { columnName, dialectOf, missingUnits, type ReadBlock } from './reading.ts';
import type { Upload } from './useUpload.ts';

const X_UNITS = ['nm', 'cm-1', 'eV', 'um', 'THz'] as const;
const Y_UNITS = [
  'absorbance',
  'percent-transmittance',
  'transmittance',
  'epsilon',
  'log-epsilon',
  'kubelka-munk',
  'percent-reflectance',
  'reflectance',
  'delta-epsilon',
  'emission',
  'arbitrary',
] as const;

/** What a person may say about a file; each answer reads it anew. Open where the file leaves something unsettled. */
export function ReadingChoices({ upload, block }: { upload: Upload; block: ReadBlock }) {
  const { options, choose } = upload;
  const dialect = dialectOf(block);
  const missing = missingUnits(block);
  const asks = missing.length > 0 || block.warnings.some(({ code }) => code.startsWith('ask-'));
  const x = options.columns?.x ?? 0;
  const pickColumns = (nextX: number, y: number[]) => choose({ columns: { x: nextX, y } });
  const others = (at: number) => Array.from({ length: dialect?.columns ?? 0 }, (_, i) => i).filter((i) => i !== at);
  return (
    <details open={asks || Object.keys(options).length > 0}>
      <summary className="min-h-6 w-fit text-zaffre">Read it otherwise</summary>
      <div className="mt-2 grid grid-cols-[repeat(auto-fit,minmax(190px,1fr))] items-start gap-3">
        <Unit
          label="Abscissa"
          units={X_UNITS}
          told={options.xUnit}
          read={block.xUnit}
          suggested={block.suggestedXUnit}
          onTell={(xUnit) => choose({ xUnit: xUnit as ReadingOptions['xUnit'] })}
        />
        <Unit
          label="Ordinate"
          units={Y_UNITS}
          told={options.yUnit}
          read={block.yUnit}
          suggested={block.suggestedYUnit}
          onTell={(yUnit) => choose({ yUnit: yUnit as ReadingOptions['yUnit'] })}
        />
        {dialect && (
          <>
            <Select
              label="Decimal sign"
              value={options.decimalComma === undefined ? '' : String(options.decimalComma)}
              options={[
                { value: '', label: `as read: ${dialect.decimalComma ? 'comma' : 'point'}` },
                { value: 'true', label: 'comma' },
                { value: 'false', label: 'point' },
              ]}
              onChange={({ currentTarget: { value } }) =>
                choose({ decimalComma: value === '' ? undefined : value === 'true' })
              }
            />
            <Select
              label="Divided by"
              value={options.delimiter ?? ''}
              options={[
                { value: '', label: 'as read' },
                { value: '\t', label: 'tabs' },
                { value: ';', label: 'semicolons' },
                { value: ',', label: 'commas' },
                { value: ' ', label: 'spaces' },
              ]}
              onChange={({ currentTarget: { value } }) => choose({ delimiter: value || undefined })}
            />
            {dialect.columns > 2 && (
              <>
                <Select
                  label="Column of the abscissa"
                  value={String(x)}
                  options={[x, ...others(x)]
                    .sort((a, b) => a - b)
                    .map((i) => ({ value: String(i), label: columnName(dialect, i) }))}
                  onChange={({ currentTarget: { value } }) => pickColumns(Number(value), others(Number(value)))}
                />
                <Select
                  label="Columns of the ordinate"
                  value={options.columns?.y.length === 1 ? String(options.columns.y[0]) : ''}
                  options={[
                    { value: '', label: options.columns ? 'all others' : 'as read' },
                    ...others(x).map((i) => ({ value: String(i), label: columnName(dialect, i) })),
                  ]}
                  onChange={({ currentTarget: { value } }) =>
                    value === '' ? choose({ columns: undefined }) : pickColumns(x, [Number(value)])
                  }
                />
              </>
            )}
          </>
        )}
      </div>
    </details>
  );
}

interface UnitProps {
  label: string;
  units: readonly string[];
  told: string | undefined;
  read: string | null;
  suggested: string | undefined;
  onTell: (unit: string | undefined) => void;
}

function Unit({ label, units, told, read, suggested, onTell }: UnitProps) {
  const ordered = suggested ? [suggested, ...units.filter((unit) => unit !== suggested)] : units;
  const unsettled = read === null && !told;
  return (
    <Select
      label={label}
      value={told ?? ''}
      error={unsettled ? 'The file does not say; choose' : undefined}
      options={[
        { value: '', label: read ? `as read: ${UNIT_WORDS[read] ?? read}` : 'not settled' },
        ...ordered.map((unit) => ({
          value: unit,
          label: `${UNIT_WORDS[unit] ?? unit}${unit === suggested ? ' (suits the numbers)' : ''}`,
        })),
      ]}
      onChange={({ currentTarget: { value } }) => onTell(value || undefined)}
    />
  );
}
