import { X } from 'lucide-react';
import { useState } from 'react';
import { TextArea } from '../ui/controls.tsx';
import { type Address, MOST_AT_ONCE, readAddresses, withoutAddress } from './address-list.ts';

interface Props {
  value: string;
  onChange: (value: string) => void;
  /** What the server said of single addresses. */
  refused: ReadonlyMap<string, string>;
  /** Whether sending was tried: then the entry being typed is judged, too. */
  wasTried: boolean;
  className?: string;
}

/** A box for one address or a pasted list of them; what was understood stands under it, and what was not. */
export function AddressField({ value, onChange, refused, wasTried, className }: Props) {
  const [isTyping, setIsTyping] = useState(false);
  const addresses = readAddresses(value);
  // The last entry is not done while somebody types it.
  const open = isTyping && !wasTried && !/[,;\s]$/.test(value) ? addresses.at(-1) : undefined;
  const faultOf = (address: Address) =>
    address === open ? null : (address.fault ?? refused.get(address.email) ?? null);
  const faults = addresses.flatMap((address) => faultOf(address) ?? []);
  const error = faultText(addresses.length, faults, wasTried);
  const isShown = addresses.length > 1 || faults.length > 0;
  return (
    <div className={className}>
      <TextArea
        label="E-mail addresses"
        hint="One or many, parted by commas, semicolons or lines; names beside them are left out."
        rows={Math.min(6, Math.max(2, value.split('\n').length))}
        autoComplete="off"
        spellCheck={false}
        error={error}
        value={value}
        onChange={(event) => onChange(event.target.value)}
        onFocus={() => setIsTyping(true)}
        onBlur={() => setIsTyping(false)}
      />
      {isShown && (
        <ul className="mt-2 flex flex-wrap gap-1.5" aria-label="Addresses understood">
          {addresses.map((address) => (
            <li key={address.email}>
              <AddressChip
                address={address}
                fault={faultOf(address)}
                onRemove={() => onChange(withoutAddress(value, address.email))}
              />
            </li>
          ))}
        </ul>
      )}
    </div>
  );
}

/** Faults that are told in full; more of them are counted. */
const TOLD = 4;

function faultText(count: number, faults: string[], wasTried: boolean): string | undefined {
  if (count > MOST_AT_ONCE) return `${count} addresses; at most ${MOST_AT_ONCE} go out at once`;
  const more = faults.length > TOLD ? `; and ${faults.length - TOLD} more` : '';
  if (faults.length > 0) return `${faults.slice(0, TOLD).join('; ')}${more}. Mend or remove it.`;
  return wasTried && count === 0 ? 'Give at least one address' : undefined;
}

function AddressChip({ address, fault, onRemove }: { address: Address; fault: string | null; onRemove: () => void }) {
  const looks = fault ? 'border-alert-line bg-alert-wash text-alert' : 'border-transparent bg-zaffre-wash text-zaffre';
  return (
    <button
      type="button"
      onClick={onRemove}
      title={fault ?? undefined}
      aria-label={`Remove ${address.email}`}
      className={`inline-flex min-h-6 max-w-72 items-center gap-1 rounded border px-2 py-0.5 text-xs hover:text-ink ${looks}`}
    >
      {fault && <span aria-hidden="true">▲</span>}
      <span className="truncate">{address.email}</span>
      <X aria-hidden="true" size={12} strokeWidth={2.2} className="flex-none" />
    </button>
  );
}
