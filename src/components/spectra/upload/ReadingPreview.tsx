import { useMemo, useState } from 'react';
import { formatNumber } from '#src/components/notation/quantity.ts';
import { Checkbox } from '#src/components/ui/controls.tsx';
import { Notice } from '#src/components/ui/StatusLine.tsx';
import { SpectrumPlot } from '../plot/SpectrumPlot.tsx';
import { UNIT_WORDS } from '../words.ts';
import type { ConditionsDraft } from './conditions-draft.ts';
import { ReadingChoices } from './ReadingChoices.tsx';
import {
  blockRange,
  dialectOf,
  dialectText,
  flagsSoFar,
  missingUnits,
  previewSeries,
  type ReadBlock,
} from './reading.ts';
import type { Upload } from './useUpload.ts';

interface ReadingPreviewProps {
  upload: Upload;
  blocks: readonly ReadBlock[];
}

/** How a file was read: in words, as a small plot, with the choices where it is not settled. */
export function ReadingPreview({ upload, blocks }: ReadingPreviewProps) {
  const { chosen, setChosen, draft } = upload;
  const preview = useMemo(() => previewSeries(blocks, chosen, draft.technique), [blocks, chosen, draft.technique]);
  const shown = blocks[chosen[0] ?? 0];
  const toggle = (i: number) =>
    setChosen((now) => (now.includes(i) ? now.filter((one) => one !== i) : [...now, i].sort((a, b) => a - b)));
  return (
    <div className="flex flex-col gap-4">
      {blocks.length > 1 && (
        <fieldset className="min-w-0">
          <legend className="mb-1 text-xs text-ink-soft">
            The file holds {blocks.length}. Which of them are to be spectra here? Each becomes one of its own.
          </legend>
          <div className="grid gap-x-4 sm:grid-cols-2">
            {blocks.map((block, i) => (
              <Checkbox
                key={i}
                label={block.title || `spectrum ${i + 1}`}
                hint={`${pointsText(block)}${block.kind === 'peaks' ? '; a table of peaks, no curve' : ''}`}
                checked={chosen.includes(i)}
                disabled={block.kind === 'peaks'}
                onChange={() => toggle(i)}
              />
            ))}
          </div>
        </fieldset>
      )}
      {shown && <ReadAs block={shown} draft={draft} />}
      {shown && <ReadingChoices upload={upload} block={shown} />}
      {preview && (
        <SpectrumPlot
          series={preview.series}
          xUnit="nm"
          yUnit={preview.quantity}
          height={220}
          label="The file as it was read"
        />
      )}
    </div>
  );
}

const pointsText = ({ points }: ReadBlock) => (points === 1 ? '1 point' : `${formatNumber(points)} points`);

function ReadAs({ block, draft }: { block: ReadBlock; draft: ConditionsDraft }) {
  const [showsHead, setShowsHead] = useState(false);
  const dialect = dialectOf(block);
  const range = blockRange(block);
  const flags = useMemo(() => flagsSoFar(block, draft), [block, draft]);
  const head = Object.entries(block.metadata);
  const missing = missingUnits(block);
  return (
    <div className="flex flex-col gap-2.5">
      <p>
        Read as <b className="font-semibold">{block.format === 'jcamp-dx' ? 'JCAMP-DX' : 'text in columns'}</b>
        {dialect && `: ${dialectText(dialect)}`}. {pointsText(block)}
        {range && (
          <>
            {' '}
            from <span className="num">{formatNumber(range[0], 5)}</span> to{' '}
            <span className="num">{formatNumber(range[1], 5)}</span>
          </>
        )}
        , {block.xUnit ? UNIT_WORDS[block.xUnit] : 'abscissa without unit'},{' '}
        {block.yUnit ? UNIT_WORDS[block.yUnit] : 'ordinate without unit'}.
      </p>
      {missing.length > 0 && (
        <Notice title="Not settled by the file:">
          {missing
            .map((axis) => (axis === 'xUnit' ? 'the unit of the abscissa' : 'the quantity of the ordinate'))
            .join(' and ')}
          . Tell it below; what the numbers suggest is offered first.
        </Notice>
      )}
      {block.warnings.length > 0 && (
        <ul className="flex flex-col gap-0.5">
          {block.warnings.map(({ code, detail, line }) => (
            <li key={`${code} ${line} ${detail}`} className="flex gap-1.5">
              <span aria-hidden="true" className="text-alert">
                ▲
              </span>
              <span>
                {detail}
                {line !== undefined && <span className="text-ink-soft"> (line {line})</span>}
              </span>
            </li>
          ))}
        </ul>
      )}
      {flags.length > 0 && (
        <ul aria-label="What the conditions say against the curve" className="flex flex-col gap-0.5 text-ink-soft">
          {flags.map(({ code, detail }) => (
            <li key={code}>{detail}</li>
          ))}
        </ul>
      )}
      {head.length > 0 && (
        <div>
          <button
            type="button"
            aria-expanded={showsHead}
            className="link min-h-6 text-xs"
            onClick={() => setShowsHead(!showsHead)}
          >
            {showsHead
              ? 'Hide the head of the file'
              : `Head of the file, ${head.length === 1 ? '1 line' : `${head.length} lines`}`}
          </button>
          {showsHead && (
            <dl className="mt-1 grid max-h-56 grid-cols-[auto_minmax(0,1fr)] gap-x-3 overflow-y-auto border border-faint p-2 text-xs">
              {head.map(([name, value]) => (
                <div key={name} className="contents">
                  <dt className="text-ink-soft">{name}</dt>
                  <dd className="num break-words">{value}</dd>
                </div>
              ))}
            </dl>
          )}
        </div>
      )}
    </div>
  );
}
