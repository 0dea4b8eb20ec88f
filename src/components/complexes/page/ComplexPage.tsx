import { useState } from 'react';
import type { LigandReading } from '#src/chem/formula/index.ts';
import { LevelsOfComplex } from '#src/components/ligand-field/LevelsOfComplex.tsx';
import { SymmetryOfComplex } from '#src/components/symmetry/SymmetryOfComplex.tsx';
import { Button, ButtonLink } from '#src/components/ui/Button.tsx';
import { StatusLine } from '#src/components/ui/StatusLine.tsx';
import { CautionsPanel } from '../register/CautionsPanel.tsx';
import { BandsPanel } from './BandsPanel.tsx';
import { Banners } from './Banners.tsx';
import { EditDialog } from './EditDialog.tsx';
import { HistoryPanel } from './HistoryPanel.tsx';
import { PreparationsPanel } from './PreparationsPanel.tsx';
import { SpecimenLabel } from './SpecimenLabel.tsx';
import { SpectraPanel } from './SpectraPanel.tsx';
import { type StateChange, StateDialog } from './StateDialog.tsx';
import { type FirstComplex, useBandLists, useComplexRecord } from './useComplexPage.ts';

interface ComplexPageProps {
  first: FirstComplex;
  /** Ligands as the formula reads. */
  ligands: LigandReading[];
  /** Answers given when the formula was read at registration. */
  answers: Record<string, string>;
  /** Labs the reader may add preparations for; null for a guest, who is shown nothing of preparations. */
  labs: { id: string; name: string }[] | null;
  sentences: { NO_CAUTION_COMPUTED: string; NO_RULE_MATCHED: string; STANDING_SENTENCE: string };
}

/** A complex: its label, its spectra over each other, their bands, what was made and what happened. */
export function ComplexPage({ first, ligands, answers, labs, sentences }: ComplexPageProps) {
  const { complex, etag, reload } = useComplexRecord(first);
  const bandLists = useBandLists(first.spectra, first.bands);
  const [open, setOpen] = useState<'edit' | StateChange | null>(null);
  const [said, setSaid] = useState<string | null>(null);
  const addAt =
    complex.may.addSpectrum && labs !== null && labs.length > 0 ? `/spectra/new?complex=${complex.accession}` : null;
  const saved = (what: string) => () => {
    setSaid(what);
    void reload();
  };
  return (
    <div className="flex flex-col gap-5">
      <Banners complex={complex} alias={first.alias ?? null} />
      <div className="grid items-start gap-6 lg:grid-cols-[292px_minmax(0,1fr)]">
        <aside aria-label="Identity" className="flex min-w-0 flex-col gap-5">
          <SpecimenLabel complex={complex} ligands={ligands} />
          <CautionsPanel cautions={complex.cautions} sentences={sentences} />
        </aside>
        <div className="grid min-w-0 grid-cols-[minmax(0,1fr)] gap-5">
          {(addAt || complex.may.change || said) && (
            <div className="no-print flex flex-wrap items-center gap-2">
              {addAt && (
                <ButtonLink kind="primary" href={addAt}>
                  Add a spectrum
                </ButtonLink>
              )}
              {complex.may.change && <Actions state={complex.state} onChoose={setOpen} />}
              <StatusLine>{said}</StatusLine>
            </div>
          )}
          <SpectraPanel spectra={first.spectra} total={first.totalSpectra} bandLists={bandLists} addAt={addAt} />
          <BandsPanel lists={bandLists} hasSpectra={first.spectra.length > 0} />
          <LevelsOfComplex
            complex={complex}
            ligands={ligands}
            lists={bandLists}
            maySave={labs !== null && complex.state !== 'withdrawn'}
          />
          <SymmetryOfComplex complex={complex} lists={bandLists} />
          <div className={`grid items-start gap-5 ${labs ? 'xl:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]' : ''}`}>
            {labs && <PreparationsPanel complex={complex} labs={labs} onAdded={saved('The preparation is added')} />}
            <HistoryPanel history={complex.history} />
          </div>
        </div>
      </div>
      {open === 'edit' && (
        <EditDialog {...{ complex, etag, answers }} onSaved={saved('Saved')} onClose={() => setOpen(null)} />
      )}
      {open !== null && open !== 'edit' && (
        <StateDialog
          change={open}
          what="complex"
          name={complex.accession}
          url={`/api/complexes/${complex.accession}`}
          etag={etag}
          onSaved={saved('Saved')}
          onDeleted={() => location.assign('/complexes')}
          onClose={() => setOpen(null)}
        />
      )}
    </div>
  );
}

function Actions({ state, onChoose }: { state: string; onChoose: (what: 'edit' | StateChange) => void }) {
  return (
    <>
      {state === 'draft' && <Button onClick={() => onChoose('register')}>Register</Button>}
      {state !== 'withdrawn' && <Button onClick={() => onChoose('edit')}>Edit</Button>}
      {state === 'registered' && <Button onClick={() => onChoose('withdraw')}>Withdraw</Button>}
      {state === 'draft' && (
        <Button kind="danger" onClick={() => onChoose('delete')}>
          Delete draft
        </Button>
      )}
      {state === 'withdrawn' && <Button onClick={() => onChoose('restore')}>Take the withdrawal back</Button>}
    </>
  );
}
