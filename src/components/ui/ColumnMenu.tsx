import { ChevronDown } from 'lucide-react';
import { buttonClass } from './Button.tsx';
import { Checkbox } from './controls.tsx';

interface ColumnMenuProps {
  columns: readonly { id: string; name: string; isVisible: boolean }[];
  onToggle: (id: string, isVisible: boolean) => void;
  compact?: { value: boolean; onChange: (value: boolean) => void };
}

/** Which columns a table shows. The page closes it on a click elsewhere and on Escape. */
export function ColumnMenu({ columns, onToggle, compact }: ColumnMenuProps) {
  return (
    <details data-menu className="relative">
      <summary className={`${buttonClass('plain', 'small')} list-none [&::-webkit-details-marker]:hidden`}>
        Columns
        <ChevronDown aria-hidden="true" size={13} />
      </summary>
      <fieldset className="absolute right-0 z-30 mt-1 min-w-52 rounded border border-hairline bg-glaze px-3 py-2 shadow-float">
        <legend className="sr-only">Columns shown</legend>
        {columns.map(({ id, name, isVisible }) => (
          <Checkbox
            key={id}
            label={name}
            checked={isVisible}
            onChange={(event) => onToggle(id, event.currentTarget.checked)}
          />
        ))}
        {compact && (
          <div className="mt-1 border-t border-faint pt-1">
            <Checkbox
              label="Low rows"
              checked={compact.value}
              onChange={(event) => compact.onChange(event.currentTarget.checked)}
            />
          </div>
        )}
      </fieldset>
    </details>
  );
}
