import { useMemo } from 'react';
import {
  type CautionContext,
  cautionsFor,
  NO_CAUTION_COMPUTED,
  NO_RULE_MATCHED,
  STANDING_SENTENCE,
} from '#src/chem/cautions/index.ts';
import { prefixedFormula } from '#src/components/complexes/prefixed-formula.ts';
import { CautionsPanel } from '#src/components/complexes/register/CautionsPanel.tsx';
import { Formula } from '#src/components/notation/index.tsx';
import { Button } from '#src/components/ui/Button.tsx';
import { Checkbox, Select, TextInput } from '#src/components/ui/controls.tsx';
import { ProblemError } from '#src/components/ui/http.ts';
import { Panel } from '#src/components/ui/Panel.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import { Progress } from '#src/components/ui/Progress.tsx';
import { Notice } from '#src/components/ui/StatusLine.tsx';
import type { ComplexRecord } from '#src/contracts/complexes.ts';
import { TECHNIQUES } from '../words.ts';
import { ConditionFields } from './ConditionFields.tsx';
import { type ConditionErrors, solventNames } from './conditions-draft.ts';
import { DropZone } from './DropZone.tsx';
import { Outcomes } from './Outcomes.tsx';
import { ReadingPreview } from './ReadingPreview.tsx';
import { readNumber } from './read-number.ts';
import { type Upload, type UploadDraft, useUpload } from './useUpload.ts';

export interface UploadFormProps {
  complex: Pick<ComplexRecord, 'accession' | 'formula' | 'isomer' | 'preparations'>;
  /** Labs the spectrum can be measured by: those of the person. */
  labs: { id: string; name: string }[];
  /** What the cautions look at, apart from what is typed here. */
  composition: Pick<CautionContext, 'composition' | 'ligands' | 'metals'>;
}

/** Upload spectra of a complex: how the file was read is seen before anything is stored. */
export function UploadForm({ complex, labs, composition }: UploadFormProps) {
  const upload = useUpload(complex.accession, labs[0]?.id ?? '');
  const { draft, change, file, queue, blocks, work, problem, outcomes, chosen } = upload;
  const lab = labs.find(({ id }) => id === draft.lab) ?? labs[0];
  const yUnit = blocks?.[chosen[0] ?? 0]?.yUnit ?? null;
  return (
    <div className="grid items-start gap-6 lg:grid-cols-[minmax(0,1fr)_320px]">
      <div className="grid min-w-0 grid-cols-[minmax(0,1fr)] gap-5">
        <Outcomes outcomes={outcomes} accession={complex.accession} isOver={file === null} />
        <DropZone onFiles={upload.take} isSmall={file !== null} />
        {file && (
          <Panel
            title={<span className="break-all">{file.name}</span>}
            aside={queue.length > 1 && `${queue.length - 1} more after this`}
          >
            <div className="flex flex-col gap-4">
              {work?.kind === 'reading' && (
                <Progress label={`Reading ${work.what}`} value={work.share} onCancel={upload.cancel} />
              )}
              {!blocks && !work && (
                <div className="flex gap-2">
                  <Button onClick={upload.retryReading}>Read it again</Button>
                </div>
              )}
              {blocks && <ReadingPreview upload={upload} blocks={blocks} />}
              {problem !== null && <Problem problem={problem} />}
              <div>
                <Button size="small" kind="quiet" onClick={upload.leaveOut}>
                  Leave this file out
                </Button>
              </div>
            </div>
          </Panel>
        )}
        <Panel title="Conditions">
          <div className="flex flex-col gap-4">
            <TextInput
              label="Title"
              hint="Empty: the title in the file, or its name"
              maxLength={200}
              value={draft.title}
              disabled={chosen.length > 1}
              onChange={(event) => change({ title: event.currentTarget.value })}
            />
            <ConditionFields
              draft={draft}
              change={change}
              errors={{ ...refusals(problem), ...upload.errors }}
              yUnit={yUnit}
              labName={lab?.name ?? ''}
            />
          </div>
        </Panel>
      </div>
      <aside aria-label="Where it goes" className="flex min-w-0 flex-col gap-5 lg:sticky lg:top-4">
        <Target {...{ complex, labs, upload }} />
        <Cautions {...{ complex, composition, draft }} />
      </aside>
    </div>
  );
}

const FIELDS = ['solvent', 'concentration', 'pathLength', 'temperature', 'title', 'bandwidth'] as const;

/** What the server said of single fields. */
function refusals(problem: unknown): ConditionErrors {
  if (!(problem instanceof ProblemError)) return {};
  const found = FIELDS.flatMap((name) => {
    const detail = problem.about(name);
    return detail ? [[name === 'solvent' ? 'solvents' : name, detail] as const] : [];
  });
  return Object.fromEntries(found);
}

type TargetProps = Pick<UploadFormProps, 'complex' | 'labs'> & { upload: Upload };

/** The complex, the lab that measured, the material, and the sending. */
function Target({ complex, labs, upload }: TargetProps) {
  const { draft, change, obstacle, work } = upload;
  const preparations = complex.preparations;
  return (
    <section aria-label="Target" className="specimen flex flex-col gap-3 px-[18px] pt-3.5 pb-[18px]">
      <p>
        <a href={`/complexes/${complex.accession}`} className="link num">
          {complex.accession}
        </a>
        <br />
        <span className="text-lg font-semibold">
          <Formula formula={prefixedFormula(complex.formula, complex.isomer)} className="whitespace-normal!" />
        </span>
      </p>
      <Select
        label="Lab that measured"
        value={labs.some(({ id }) => id === draft.lab) ? draft.lab : (labs[0]?.id ?? '')}
        options={labs.map(({ id, name }) => ({ value: id, label: name }))}
        onChange={(event) => change({ lab: event.currentTarget.value })}
      />
      <Select
        label="Preparation"
        value={preparations.some(({ id }) => id === draft.preparation) ? draft.preparation : ''}
        options={[
          { value: '', label: 'not stated' },
          ...preparations.map(({ id, label, lab }) => ({ value: id, label: `${label}, ${lab.name}` })),
        ]}
        onChange={(event) => change({ preparation: event.currentTarget.value })}
      />
      <Checkbox
        label="Synthetic"
        hint="Computed from band parameters, not measured"
        checked={draft.synthetic}
        onChange={(event) => change({ synthetic: event.currentTarget.checked })}
      />
      {work?.kind === 'sending' ? (
        <Progress
          label={work.share === null ? 'Being stored' : 'Uploading'}
          detail={work.what}
          value={work.share}
          onCancel={upload.cancel}
        />
      ) : (
        <Button kind="primary" disabled={obstacle !== null || work !== null} onClick={upload.send}>
          {upload.chosen.length > 1 ? `Store ${upload.chosen.length} spectra` : 'Store the spectrum'}
        </Button>
      )}
      {obstacle && <p className="text-xs text-ink-soft">{obstacle}.</p>}
    </section>
  );
}

/** The usual cautions for this composition measured in this way; what must not be done to the sample stands first. */
function Cautions({
  complex,
  composition,
  draft,
}: Pick<UploadFormProps, 'complex' | 'composition'> & { draft: UploadDraft }) {
  const preparation = complex.preparations.find(({ id }) => id === draft.preparation);
  const solvent = solventNames(draft).join('\n');
  const { technique, electrolyte, temperature } = draft;
  const cautions = useMemo(() => {
    const kelvin = readNumber(temperature);
    return cautionsFor({
      ...composition,
      counterIons: (preparation?.counterIons ?? []).map(({ formula }) => formula),
      solvent: solvent === '' ? [] : solvent.split('\n'),
      technique: TECHNIQUES[technique],
      ...(electrolyte.trim() ? { electrolyte: electrolyte.trim() } : {}),
      ...(kelvin !== null && Number.isFinite(kelvin) ? { temperature: kelvin } : {}),
    });
  }, [composition, preparation, solvent, technique, electrolyte, temperature]);
  const stop = cautions.find(({ id }) => id === 'GRIND');
  return (
    // On a narrow screen they stand before the button that stores, as they stand beside it on a wide one.
    <div className="flex flex-col gap-5 max-lg:order-first">
      {stop && (
        <div role="alert">
          <Notice title="Stop before the sample is ground.">
            {stop.detail} Ask who is responsible for the material; the safety data sheet and local rules decide.
          </Notice>
        </div>
      )}
      <CautionsPanel
        cautions={cautions.filter(({ id }) => id !== 'GRIND')}
        sentences={{
          NO_CAUTION_COMPUTED,
          NO_RULE_MATCHED: stop ? 'No other rule matched.' : NO_RULE_MATCHED,
          STANDING_SENTENCE,
        }}
      />
    </div>
  );
}
