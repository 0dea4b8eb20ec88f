import { useState } from 'react';
import type { BundleInput, BundleRecord } from '../../contracts/sharing.ts';
import { Button, ButtonLink } from '../ui/Button.tsx';
import { CopyText } from '../ui/CopyText.tsx';
import { Checkbox } from '../ui/controls.tsx';
import { Panel } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { Progress } from '../ui/Progress.tsx';
import { checkCommand, isUnderWay, readSize } from './bundle-state.ts';
import { useBundle } from './useBundle.ts';

interface Props {
  target: BundleInput;
  isEmpty: boolean;
  mayDownload: boolean;
}

/** The content as one file to take away: order it, wait, download it, check it. */
export function BundlePanel({ target, isEmpty, mayDownload }: Props) {
  const { order, bundle, fileName, cancel } = useBundle(target);
  const [notify, setNotify] = useState(false);
  if (!mayDownload) {
    return (
      <Panel title="Download">
        <p className="text-ink-soft">Your access is for reading. The lab that invited you can allow downloads.</p>
      </Panel>
    );
  }
  const record = bundle.data;
  const isBusy = order.isPending || (record !== undefined && isUnderWay(record));
  return (
    <Panel title="Bundle">
      <p className="text-ink-soft">
        A ZIP with each spectrum as original file, JCAMP-DX and CSV, tables, the licence and checksums.
      </p>
      <div className="mt-3 flex flex-col gap-3">
        <Problem problem={order.error ?? bundle.error ?? cancel.error} />
        {record?.state === 'failed' && (
          <Problem problem={new Error(record.error ?? 'The bundle could not be made. Try again.')} />
        )}
        {isBusy && (
          <Progress
            label={record?.state === 'running' ? 'Making the bundle' : 'Waiting to begin'}
            value={record?.state === 'running' ? record.progress : null}
            onCancel={() => cancel.mutate()}
          />
        )}
        {record?.state === 'ready' && <Ready bundle={record} fileName={fileName} />}
        <div role="status">{record?.state === 'cancelled' && 'Cancelled.'}</div>
        {!isBusy && record?.state !== 'ready' && (
          <>
            <Checkbox
              label="Send me a mail when it is ready"
              hint="If it takes longer than a minute, one is sent in any case."
              checked={notify}
              onChange={(event) => setNotify(event.target.checked)}
            />
            <Button className="self-start" disabled={isEmpty} onClick={() => order.mutate(notify)}>
              Make a bundle
            </Button>
          </>
        )}
        {isEmpty && <p className="text-xs text-ink-soft">There is nothing in it yet.</p>}
      </div>
    </Panel>
  );
}

function Ready({ bundle, fileName }: { bundle: BundleRecord; fileName: string | undefined }) {
  return (
    <>
      <ButtonLink kind="primary" href={`/api/bundles/${bundle.id}/file`} download className="self-start">
        Download{bundle.size !== null && ` (${readSize(bundle.size)})`}
      </ButtonLink>
      {bundle.sha256 && (
        <div className="text-xs">
          <CopyText label="SHA-256 of the file" text={bundle.sha256} />
          {fileName && (
            <div className="mt-2">
              <CopyText label="To check the download, where it lies" text={checkCommand(bundle.sha256, fileName)} />
            </div>
          )}
          <p className="mt-2 text-ink-soft">
            It answers OK when nothing was lost. Unpacked, the bundle checks itself:{' '}
            <code className="num text-ink">sha256sum -c manifest-sha256.txt</code>
          </p>
        </div>
      )}
    </>
  );
}
