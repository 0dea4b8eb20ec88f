import { Popover } from '@base-ui/react/popover';
import { Columns3, Download } from 'lucide-react';
import { buttonClass } from './Button.tsx';
import { Checkbox } from './controls.tsx';
import { CONTROL } from './Field.tsx';
import { saveText } from './save-text.ts';

interface TableToolsProps {
  name: string;
  filter: string;
  onFilter: (text: string) => void;
  count: number;
  total: number;
  columns: readonly { id: string; label: string; visible: boolean; toggle: () => void }[];
  csv: () => string;
}

/** Filter, choice of columns and download above a table. */
export function TableTools({ name, filter, onFilter, count, total, columns, csv }: TableToolsProps) {
  return (
    <div className="mb-3 flex flex-wrap items-center gap-3">
      <input
        type="search"
        aria-label={`Filter ${name}`}
        placeholder="Filter"
        value={filter}
        onChange={(event) => onFilter(event.target.value)}
        className={`${CONTROL} max-w-56`}
      />
      <span role="status" className="text-xs text-ink-soft">
        {filter ? `${count} of ${total}` : total}
      </span>
      <div className="ml-auto flex gap-2">
        <Popover.Root>
          <Popover.Trigger className={buttonClass('plain', 'small')}>
            <Columns3 aria-hidden="true" size={14} />
            Columns
          </Popover.Trigger>
          <Popover.Portal>
            <Popover.Positioner sideOffset={4} align="end" className="z-40">
              <Popover.Popup
                aria-label="Columns shown"
                className="min-w-40 rounded border border-hairline bg-glaze p-2 shadow-float outline-none"
              >
                {columns.map(({ id, label, visible, toggle }) => (
                  <Checkbox
                    key={id}
                    label={label}
                    checked={visible}
                    onChange={toggle}
                    disabled={visible && columns.filter((column) => column.visible).length === 1}
                  />
                ))}
              </Popover.Popup>
            </Popover.Positioner>
          </Popover.Portal>
        </Popover.Root>
        <button
          type="button"
          className={buttonClass('plain', 'small')}
          onClick={() => saveText(`${name.toLowerCase().replaceAll(' ', '-')}.csv`, csv(), 'text/csv;charset=utf-8')}
        >
          <Download aria-hidden="true" size={14} />
          CSV
        </button>
      </div>
    </div>
  );
}
