import { Button } from './Button.tsx';
import { Notice } from './StatusLine.tsx';
import type { ConditionalSave } from './useConditionalSave.ts';

/** One thing that differs between what is on record now and what was typed. */
export interface Difference {
  name: string;
  present: string;
  mine: string;
}

interface ConflictProps<T> {
  saving: ConditionalSave<T>;
  /** What differs from the present record, once that is loaded. */
  differences: (present: T) => readonly Difference[];
  /** Give up what was typed and go on from the present record. */
  onTakePresent: (present: T) => void;
  onSendMine: () => void;
}

/** Tells that somebody changed the record meanwhile, and lets a person choose with both versions in sight. */
export function Conflict<T>({ saving, differences, onTakePresent, onSendMine }: ConflictProps<T>) {
  const { isStale, present, isSending, loadPresent } = saving;
  if (!isStale) return null;
  if (!present)
    return (
      <div role="alert">
        <Notice title="Somebody changed this meanwhile.">
          What you typed is kept here and was not saved.
          <div className="mt-2.5">
            <Button disabled={isSending} onClick={() => void loadPresent()}>
              Load the present state beside it
            </Button>
          </div>
        </Notice>
      </div>
    );
  const rows = differences(present);
  return (
    <div role="alert">
      <Notice title="Somebody changed this meanwhile.">
        {rows.length === 0
          ? 'What is on record now is what you typed.'
          : 'This differs between what is on record now and what you typed:'}
        {rows.length > 0 && (
          <table className="table table-compact mt-2">
            <thead>
              <tr>
                <th scope="col">What</th>
                <th scope="col">On record now</th>
                <th scope="col">Yours</th>
              </tr>
            </thead>
            <tbody>
              {rows.map(({ name, present: now, mine }) => (
                <tr key={name}>
                  <th scope="row" className="align-middle!">
                    {name}
                  </th>
                  <td className="whitespace-normal!">{now || '–'}</td>
                  <td className="whitespace-normal!">{mine || '–'}</td>
                </tr>
              ))}
            </tbody>
          </table>
        )}
        <div className="mt-2.5 flex flex-wrap gap-2">
          <Button disabled={isSending} onClick={() => onTakePresent(present)}>
            Take what is on record
          </Button>
          {rows.length > 0 && (
            <Button kind="primary" disabled={isSending} onClick={onSendMine}>
              Save mine over it
            </Button>
          )}
        </div>
      </Notice>
    </div>
  );
}
