import { useMemo, useState } from 'react';
import { getJson, sendJson } from '#src/components/ui/http.ts';
import { useDraft } from '#src/components/ui/useDraft.ts';
import type { BandRecord, FitHistory, SpectrumRecord } from '#src/contracts/spectra.ts';
import type { FetchedCurve } from '../page/curves.ts';
import {
  type BandDraft,
  bandAt,
  bandInputs,
  draftOf,
  heightQuantity,
  holds,
  newBand,
  pickable,
  sameBands,
  step,
  undo,
} from './band-list.ts';

interface Kept {
  /** What stood on record when the first change was made, as it would be sent. */
  base: string;
  /** Null while nothing is changed. */
  list: BandDraft[] | null;
  /** How the fitted bands of the list were found, where they were fitted since. */
  fit: FitHistory | null;
}
const NOTHING: Kept = { base: '', list: null, fit: null };

const asSent = (bands: readonly BandRecord[]) => JSON.stringify(bandInputs(bands.map(draftOf)));

/** The bands of a spectrum while a person works on them; the unsaved list outlives a reload. */
export function useBandEditor(spectrum: SpectrumRecord, curve: FetchedCurve | null, onSaved: () => void) {
  const { id, bands } = spectrum;
  const standing = useMemo(() => bands.map(draftOf), [bands]);
  const { draft, change, clear } = useDraft<Kept>(`bands:${id}`, NOTHING);
  const [past, setPast] = useState<BandDraft[][]>([]);
  const [problem, setProblem] = useState<unknown>(null);
  const [isSending, setIsSending] = useState(false);
  const [said, setSaid] = useState('');
  const list = draft.list ?? standing;
  const candidates = useMemo(() => (curve ? pickable(curve) : []), [curve]);
  const quantity = curve ? heightQuantity(curve.quantity) : null;
  const hasNewFit = draft.fit !== null && list.some(({ found }) => found === 'fitted');
  const isChanged = draft.list !== null && (hasNewFit || !sameBands(draft.list, standing));
  const isStale = isChanged && draft.base !== asSent(bands);

  const set = (work: { list: BandDraft[]; past: BandDraft[][] }) => {
    setPast(work.past);
    change({ list: work.list, base: draft.list === null ? asSent(bands) : draft.base });
  };
  const put = (next: BandDraft[], words: string) => {
    set(step({ list, past }, next));
    setSaid(words);
  };
  const add = (measured: Parameters<typeof newBand>[2]) => {
    if (!quantity) return;
    if (holds(list, measured.wavenumber)) return setSaid('There is a band at this place already');
    put([...list, newBand(crypto.randomUUID(), quantity, measured)], `Added ${Math.round(measured.wavenumber)} cm⁻¹`);
  };

  /** Bands the picker finds that are not in the list yet. */
  const offered = useMemo(() => candidates.filter(({ wavenumber }) => !holds(list, wavenumber)), [candidates, list]);

  const save = async () => {
    setIsSending(true);
    setProblem(null);
    try {
      const present = await getJson<BandRecord[]>(`/api/spectra/${id}/bands`);
      if (asSent(present) !== draft.base) {
        change({ base: draft.base });
        onSaved(); // reads the record again, which shows that it is another than the one worked on
        return;
      }
      if (hasNewFit) await sendJson('PUT', `/api/spectra/${id}/fit`, { bands: bandInputs(list), fit: draft.fit });
      else await sendJson('PUT', `/api/spectra/${id}/bands`, bandInputs(list));
      forget();
      setSaid('Saved');
      onSaved();
    } catch (error) {
      setProblem(error);
    } finally {
      setIsSending(false);
    }
  };
  const forget = () => {
    clear();
    setPast([]);
  };

  return {
    list,
    quantity,
    offered,
    isChanged,
    isStale,
    isSending,
    problem,
    said,
    mayUndo: past.length > 0,
    add,
    pick: (wavenumber: number) => {
      const found = curve && bandAt(curve, candidates, wavenumber);
      if (found) add(found);
    },
    /** The list with fitted bands in it, and how they were found. */
    takeFitted: (next: BandDraft[], fit: FitHistory) => {
      put(next, `${fit.components.length} fitted bands taken over; look at each before you save`);
      change({ fit });
    },
    takeOffered: () => {
      if (!quantity) return;
      const fresh = offered.map((measured) => newBand(crypto.randomUUID(), quantity, measured));
      put([...list, ...fresh], `Added ${fresh.length}; look at each before you save`);
    },
    edit: (key: string, part: Partial<BandDraft>) =>
      put(
        list.map((band) => (band.key === key ? { ...band, ...part } : band)),
        '',
      ),
    remove: (key: string) =>
      put(
        list.filter((band) => band.key !== key),
        'Removed; it is gone from the record once you save',
      ),
    undo: () => {
      set(undo({ list, past }));
      setSaid('Taken back');
    },
    discard: forget,
    /** Keep what was typed although others changed the bands meanwhile; theirs are replaced. */
    insist: () => change({ base: asSent(bands) }),
    save: () => void save(),
  };
}

export type BandEditing = ReturnType<typeof useBandEditor>;
