import { KeyRound, Smartphone } from 'lucide-react';
import type { FactorRecord } from '../../../contracts/second-factor.ts';
import { Button } from '../../ui/Button.tsx';
import { shortDay } from '../../ui/dates.ts';

const KIND = {
  totp: { Icon: Smartphone, word: 'Authenticator app' },
  passkey: { Icon: KeyRound, word: 'Passkey' },
};

/** The factors that count, each with when it was made and last used. */
export function FactorList({
  factors,
  onRemove,
}: {
  factors: readonly FactorRecord[];
  onRemove: (factor: FactorRecord) => void;
}) {
  return (
    <ul className="border-y border-hairline" aria-label="Your second factors">
      {factors.map((factor) => {
        const { Icon, word } = KIND[factor.kind];
        return (
          <li
            key={factor.id}
            className="flex flex-wrap items-center gap-x-3 gap-y-1 border-b border-faint py-2.5 last:border-b-0"
          >
            <Icon aria-hidden="true" size={18} className="flex-none text-zaffre" />
            <div className="min-w-0 flex-1">
              <p className="break-words font-medium">{factor.name}</p>
              <p className="text-xs text-ink-soft">
                {word} · added {shortDay(factor.createdAt)} ·{' '}
                {factor.lastUsedAt ? `last used ${shortDay(factor.lastUsedAt)}` : 'not used yet'}
              </p>
            </div>
            <Button size="small" kind="danger" onClick={() => onRemove(factor)} aria-label={`Remove ${factor.name}`}>
              Remove
            </Button>
          </li>
        );
      })}
    </ul>
  );
}
