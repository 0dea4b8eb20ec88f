import { ChevronDown, Trash2, Undo2 } from 'lucide-react';
import { Fragment, useState } from 'react';
import { BandTag } from '#src/components/marks/BandTag.tsx';
import { Unit } from '#src/components/notation/index.tsx';
import { formatNumber } from '#src/components/notation/quantity.ts';
import { Button } from '#src/components/ui/Button.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import { Notice, StatusLine } from '#src/components/ui/StatusLine.tsx';
import type { BandRecord } from '#src/contracts/spectra.ts';
import { HEIGHTS } from '../words.ts';
import { AddBand } from './AddBand.tsx';
import { type AssignmentChoices, BandRowFields } from './BandRowFields.tsx';
import { Assigned } from './BandTable.tsx';
import type { BandDraft } from './band-list.ts';
import type { BandEditing } from './useBandEditor.ts';

interface BandEditorProps {
  editing: BandEditing;
  choices: AssignmentChoices;
  /** Bands as they stand, for what was judged of them. */
  standing: readonly BandRecord[];
  onClose: () => void;
  /** Height of the curve at a place. */
  heightAt: (wavenumber: number) => number | null;
}

/** Bands picked on the curve, offered by the picker or typed, until they are saved together. */
export function BandEditor({ editing, choices, standing, onClose, heightAt }: BandEditorProps) {
  const { list, offered, quantity, isChanged, isStale, isSending } = editing;
  const discard = () => {
    editing.discard();
    onClose();
  };
  return (
    <div className="flex flex-col gap-3">
      <p className="text-ink-soft">
        Click on the curve, or press Enter at its data cursor: the nearest maximum is taken. Nothing is stored before
        you save.
      </p>
      <div className="flex flex-wrap items-center gap-2">
        <Button size="small" disabled={offered.length === 0 || !quantity} onClick={editing.takeOffered}>
          {offered.length === 0 ? 'The picker offers nothing more' : `Take the ${offered.length} the picker offers`}
        </Button>
        <Button size="small" disabled={!editing.mayUndo} onClick={editing.undo}>
          <Undo2 aria-hidden="true" size={14} />
          Undo
        </Button>
        <StatusLine kind="busy">{editing.said}</StatusLine>
      </div>
      {list.length > 0 && <DraftTable {...{ editing, choices, standing }} />}
      {quantity && <AddBand quantity={quantity} heightAt={heightAt} onAdd={editing.add} />}
      {isStale && (
        <div role="alert">
          <Notice title="Somebody changed these bands meanwhile.">
            Your list is kept and was not saved. On record now: {bandsText(standing)}.
            <div className="mt-2.5 flex flex-wrap gap-2">
              <Button onClick={discard}>Take what is on record</Button>
              <Button onClick={editing.insist}>Go on with mine</Button>
            </div>
          </Notice>
        </div>
      )}
      <Problem problem={editing.problem} />
      <div className="flex justify-end gap-2 border-t border-faint pt-3">
        <Button onClick={discard}>{isChanged ? 'Discard' : 'Close'}</Button>
        <Button kind="primary" disabled={!isChanged || isStale || isSending} onClick={editing.save}>
          Save bands
        </Button>
      </div>
    </div>
  );
}

const bandsText = (bands: readonly BandRecord[]) =>
  bands.length === 0
    ? 'none'
    : bands.map(({ wavenumber, assignment }) => `${Math.round(wavenumber)} cm⁻¹ ${assignment.class}`).join(', ');

type DraftTableProps = Pick<BandEditorProps, 'editing' | 'choices' | 'standing'>;

function DraftTable({ editing, choices, standing }: DraftTableProps) {
  const [open, setOpen] = useState<string | null>(null);
  const stateOf = (band: BandDraft) => standing.find(({ id }) => id === band.id)?.state ?? 'new';
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard
    <section aria-label="Bands being edited" tabIndex={0} className="overflow-x-auto">
      <table className="table table-compact">
        <thead>
          <tr>
            <th scope="col">
              <span className="sr-only">Class</span>
            </th>
            <th scope="col" className="text-right!">
              <Unit unit="cm-1" />
            </th>
            <th scope="col" className="text-right!">
              nm
            </th>
            <th scope="col" className="text-right!">
              {editing.quantity ? HEIGHTS[editing.quantity] : 'height'}
            </th>
            <th scope="col">Assignment</th>
            <th scope="col">State</th>
            <th scope="col">
              <span className="sr-only">Change</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {editing.list.map((band) => {
            const nm = formatNumber(1e7 / band.wavenumber, 3);
            const isOpen = open === band.key;
            return (
              <Fragment key={band.key}>
                <tr>
                  <td>
                    <BandTag bandClass={band.class} />
                  </td>
                  <td className="num text-right!">{formatNumber(Math.round(band.wavenumber))}</td>
                  <td className="num text-right!">
                    {nm}
                    {band.shoulder && ' sh'}
                  </td>
                  <td className="num text-right!">{formatNumber(band.height, 3)}</td>
                  <td>
                    <Assigned
                      assignment={{
                        class: band.class,
                        ...(band.from ? { from: band.from } : {}),
                        ...(band.to ? { to: band.to } : {}),
                        ...(band.ligand ? { ligand: band.ligand } : {}),
                      }}
                    />
                  </td>
                  <td className="text-ink-soft">{stateOf(band)}</td>
                  <td className="text-right!">
                    <span className="inline-flex gap-1.5">
                      <Button
                        size="small"
                        aria-expanded={isOpen}
                        aria-label={`Change the band at ${nm} nm`}
                        onClick={() => setOpen(isOpen ? null : band.key)}
                      >
                        Change
                        <ChevronDown aria-hidden="true" size={13} className={isOpen ? 'rotate-180' : ''} />
                      </Button>
                      <Button
                        size="small"
                        aria-label={`Remove the band at ${nm} nm`}
                        onClick={() => editing.remove(band.key)}
                      >
                        <Trash2 aria-hidden="true" size={14} />
                      </Button>
                    </span>
                  </td>
                </tr>
                {isOpen && (
                  <tr>
                    <td colSpan={7} className="p-0! whitespace-normal!">
                      <BandRowFields band={band} choices={choices} onEdit={(part) => editing.edit(band.key, part)} />
                    </td>
                  </tr>
                )}
              </Fragment>
            );
          })}
        </tbody>
      </table>
    </section>
  );
}
