import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import { ProblemError } from '#src/components/ui/http.ts';
import { useDraft } from '#src/components/ui/useDraft.ts';
import type { ReadingOptions, SpectrumRecord } from '#src/contracts/spectra.ts';
import { type ConditionsDraft, conditionErrors, conditionsInput, emptyConditions } from './conditions-draft.ts';
import { blocksAtFirst, isReady, type ReadBlock, toldOptions } from './reading.ts';
import { sendFile } from './send-file.ts';

/** Everything that is typed for an upload; it outlives a reload, the file itself does not. */
export interface UploadDraft extends ConditionsDraft {
  lab: string;
  preparation: string;
  synthetic: boolean;
}

/** What became of one spectrum of one file. */
export interface Outcome {
  file: string;
  title: string;
  id: string;
  /** It was on this complex already. */
  isDuplicate: boolean;
}

type Work = { kind: 'reading' | 'sending'; share: number | null; what: string } | null;

const isAbort = (error: unknown) => error instanceof DOMException && error.name === 'AbortError';

/** Files one after another: read, looked at, described and sent. */
export function useUpload(accession: string, defaultLab: string) {
  const initial = useMemo<UploadDraft>(
    () => ({ ...emptyConditions, lab: defaultLab, preparation: '', synthetic: false }),
    [defaultLab],
  );
  const { draft, change, clear } = useDraft(`spectrum-upload:${accession}`, initial);
  const [queue, setQueue] = useState<File[]>([]);
  const [options, setOptions] = useState<ReadingOptions>({});
  const [blocks, setBlocks] = useState<ReadBlock[] | null>(null);
  const [chosen, setChosen] = useState<number[]>([]);
  const [work, setWork] = useState<Work>(null);
  const [problem, setProblem] = useState<unknown>(null);
  const [outcomes, setOutcomes] = useState<Outcome[]>([]);
  const running = useRef<AbortController | null>(null);
  const keys = useRef(new Map<string, string>());
  const file = queue[0] ?? null;
  // Files may be added while others are sent.
  const waiting = useRef(queue);
  waiting.current = queue;

  const run = useCallback(async (task: (signal: AbortSignal) => Promise<void>) => {
    running.current?.abort();
    const controller = new AbortController();
    running.current = controller;
    setProblem(null);
    try {
      await task(controller.signal);
    } catch (error) {
      if (running.current === controller && !isAbort(error)) setProblem(error);
    } finally {
      if (running.current === controller) {
        running.current = null;
        setWork(null);
      }
    }
  }, []);
  useEffect(() => () => running.current?.abort(), []);

  const read = useCallback(
    (given: File, told: ReadingOptions) =>
      run(async (signal) => {
        setWork({ kind: 'reading', share: 0, what: given.name });
        const form = new FormData();
        form.append('file', given, given.name);
        form.append('options', JSON.stringify(told));
        const answer = await sendFile<{ blocks: ReadBlock[] }>('/api/derive/spectrum', form, {
          signal,
          onProgress: (share) => setWork({ kind: 'reading', share, what: given.name }),
        });
        setBlocks((before) => {
          if (before?.length !== answer.blocks.length) setChosen(blocksAtFirst(answer.blocks));
          return answer.blocks;
        });
      }),
    [run],
  );

  // Another file is another reading; what was typed of the conditions stays for it.
  useEffect(() => {
    setOptions({});
    setBlocks(null);
    setChosen([]);
    if (file) void read(file, {});
    else running.current?.abort();
  }, [file, read]);

  const take = (files: readonly File[]) => setQueue((now) => [...now, ...files]);
  const leaveOut = () => {
    setProblem(null);
    setQueue((now) => now.slice(1));
  };
  const choose = (part: ReadingOptions) => {
    const next = toldOptions({ ...options, ...part });
    setOptions(next);
    if (file) void read(file, next);
  };

  const errors = conditionErrors(draft);
  const ready = chosen.filter((i) => blocks?.[i] && isReady(blocks[i]));
  const obstacle = !file
    ? 'Choose a file first'
    : !blocks
      ? 'The file is not read yet'
      : chosen.length === 0
        ? 'Choose a spectrum of the file'
        : ready.length < chosen.length
          ? 'Tell the units the file does not settle'
          : Object.keys(errors).length > 0
            ? 'Some conditions cannot be read'
            : null;

  const send = () =>
    run(async (signal) => {
      if (!file || !blocks) return;
      const done: Outcome[] = [];
      for (const i of ready) {
        const title = blocks[i]?.title || file.name;
        setWork({ kind: 'sending', share: 0, what: ready.length > 1 ? `${file.name}, ${title}` : file.name });
        const metadata = metadataOf(draft, accession, options, { block: i, isOnly: ready.length === 1 });
        const outcome = await sendOne(file, metadata, title, {
          signal,
          onProgress: (share) => setWork((now) => now && { ...now, share }),
          idempotencyKey: keyFor(keys.current, file, metadata),
        });
        done.push(outcome);
        // What is stored leaves the choice, so that a second try after a failure sends the rest only.
        setChosen((now) => now.filter((one) => one !== i));
        setOutcomes((now) => [...now, outcome]);
      }
      const [only, ...others] = [...outcomes, ...done];
      const isLast = waiting.current.length === 1;
      if (isLast) clear();
      else change({ title: '' });
      if (isLast && only && others.length === 0 && !only.isDuplicate) location.assign(`/spectra/${only.id}`);
      setQueue((now) => now.slice(1));
    });

  return {
    draft,
    change,
    queue,
    file,
    options,
    blocks,
    chosen,
    setChosen,
    work,
    problem,
    outcomes,
    errors,
    obstacle,
    take,
    leaveOut,
    choose,
    send: () => void send(),
    cancel: () => running.current?.abort(),
    retryReading: () => file && void read(file, options),
  };
}

export type Upload = ReturnType<typeof useUpload>;

/** What goes along with the file. */
export function metadataOf(
  { lab, preparation, synthetic, ...conditions }: UploadDraft,
  complex: string,
  options: ReadingOptions,
  { block, isOnly }: { block: number; isOnly: boolean },
): Record<string, unknown> {
  const { title, ...told } = conditionsInput(conditions);
  return {
    complex,
    ...(preparation ? { preparation } : {}),
    ...(lab ? { lab } : {}),
    ...told,
    // One title cannot name several spectra: each then keeps the one of the file.
    ...(title && isOnly ? { title } : {}),
    ...options,
    block,
    ...(synthetic ? { synthetic } : {}),
  };
}

/** One key for one request, however often it is tried. */
function keyFor(keys: Map<string, string>, file: File, metadata: object): string {
  const what = `${file.name} ${file.size} ${file.lastModified} ${JSON.stringify(metadata)}`;
  const key = keys.get(what) ?? crypto.randomUUID();
  keys.set(what, key);
  return key;
}

async function sendOne(
  file: File,
  metadata: object,
  title: string,
  options: Parameters<typeof sendFile>[2],
): Promise<Outcome> {
  const form = new FormData();
  form.append('file', file, file.name);
  form.append('metadata', JSON.stringify(metadata));
  try {
    const stored = await sendFile<SpectrumRecord>('/api/spectra', form, options);
    return { file: file.name, title: stored.title, id: stored.id, isDuplicate: false };
  } catch (error) {
    const first = error instanceof ProblemError && error.status === 409 ? error.members.id : undefined;
    if (typeof first !== 'string') throw error;
    return { file: file.name, title, id: first, isDuplicate: true };
  }
}
