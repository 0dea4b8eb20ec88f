import { useState } from 'react';
import { Button } from '#src/components/ui/Button.tsx';
import { TextArea } from '#src/components/ui/controls.tsx';
import { Dialog } from '#src/components/ui/Dialog.tsx';
import { sendJson } from '#src/components/ui/http.ts';
import { Problem } from '#src/components/ui/Problem.tsx';
import type { BandRecord } from '#src/contracts/spectra.ts';

type Verdict = 'attest' | 'dispute';

/** Attest or dispute, for those who may. What was judged already can be judged otherwise. */
export function BandJudgement({ band, onJudged }: { band: BandRecord; onJudged: () => void }) {
  const [verdict, setVerdict] = useState<Verdict | null>(null);
  if (!band.may.judge) return null;
  return (
    <span className="inline-flex gap-1.5">
      {band.state !== 'attested' && band.assignment.class !== 'unassigned' && (
        <Button size="small" onClick={() => setVerdict('attest')}>
          Attest
        </Button>
      )}
      {band.state !== 'disputed' && (
        <Button size="small" onClick={() => setVerdict('dispute')}>
          Dispute
        </Button>
      )}
      {verdict && <JudgeDialog {...{ band, verdict, onJudged }} onClose={() => setVerdict(null)} />}
    </span>
  );
}

interface JudgeDialogProps {
  band: BandRecord;
  verdict: Verdict;
  onJudged: () => void;
  onClose: () => void;
}

function JudgeDialog({ band, verdict, onJudged, onClose }: JudgeDialogProps) {
  const [reason, setReason] = useState('');
  const [problem, setProblem] = useState<unknown>(null);
  const [isSending, setIsSending] = useState(false);
  const nm = Math.round(band.wavelength);
  const isMissing = verdict === 'dispute' && reason.trim() === '';

  const send = async () => {
    setIsSending(true);
    setProblem(null);
    try {
      const told = reason.trim();
      await sendJson('POST', `/api/bands/${band.id}/${verdict}`, told ? { reason: told } : {});
      onClose();
      onJudged();
    } catch (error) {
      setProblem(error);
    } finally {
      setIsSending(false);
    }
  };

  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={verdict === 'attest' ? `Attest the band at ${nm} nm` : `Dispute the band at ${nm} nm`}
      description={
        verdict === 'attest'
          ? 'You put your name to the assignment, as a second person who looked at it.'
          : 'Say what speaks against the assignment; whoever proposed it will read it.'
      }
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button
            kind={verdict === 'attest' ? 'primary' : 'danger'}
            disabled={isSending || isMissing}
            onClick={() => void send()}
          >
            {verdict === 'attest' ? 'Attest' : 'Dispute'}
          </Button>
        </>
      }
    >
      <div className="flex flex-col gap-3">
        {band.verdict && <p className="text-alert">{band.verdict}</p>}
        <TextArea
          label={verdict === 'attest' ? 'Remark (may stay empty)' : 'Reason'}
          value={reason}
          maxLength={2000}
          onChange={(event) => setReason(event.currentTarget.value)}
        />
        <Problem problem={problem} />
      </div>
    </Dialog>
  );
}
