import { CSPProvider } from '@base-ui/react/csp-provider';
import { Select } from '@base-ui/react/select';
import { ChevronDown } from 'lucide-react';
import { Fragment, type ReactNode } from 'react';
import { CONTROL } from '../ui/Field.tsx';

export interface Choice {
  value: string;
  label: ReactNode;
}

interface ChoiceListProps {
  label: string;
  /** Titled groups; a group without a title stands alone. */
  groups: readonly { title?: ReactNode; choices: readonly Choice[] }[];
  value: string;
  onChange: (value: string) => void;
  className?: string;
}

/** A choice from a list whose entries are set as chemistry, which a native list cannot show. */
export function ChoiceList({ label, groups, value, onChange, className = '' }: ChoiceListProps) {
  const all = groups.flatMap(({ choices }) => choices);
  return (
    <CSPProvider disableStyleElements>
      <Select.Root items={all} value={value} onValueChange={(next: string | null) => next !== null && onChange(next)}>
        <div className={`flex flex-col gap-1 ${className}`}>
          <Select.Label className="text-xs text-ink-soft">{label}</Select.Label>
          <Select.Trigger className={`${CONTROL} flex cursor-pointer items-center justify-between gap-3 text-left`}>
            <Select.Value className="min-w-0 truncate" />
            <Select.Icon>
              <ChevronDown aria-hidden="true" size={14} />
            </Select.Icon>
          </Select.Trigger>
        </div>
        <Select.Portal>
          <Select.Positioner sideOffset={4} alignItemWithTrigger={false} className="z-40">
            <Select.Popup className="max-h-96 min-w-(--anchor-width) overflow-y-auto rounded border border-hairline bg-glaze py-1 shadow-float outline-none">
              <Select.List>
                {groups.map(({ title, choices }, i) => {
                  const items = choices.map((choice) => (
                    <Select.Item
                      key={choice.value}
                      value={choice.value}
                      className="flex min-h-8 cursor-pointer items-center px-3.5 py-1 outline-none data-highlighted:bg-zaffre-wash data-highlighted:text-zaffre data-selected:font-medium"
                    >
                      <Select.ItemText>{choice.label}</Select.ItemText>
                    </Select.Item>
                  ));
                  return title ? (
                    <Select.Group key={i}>
                      <Select.GroupLabel className="px-3.5 pt-2 pb-1 text-xs text-ink-soft">{title}</Select.GroupLabel>
                      {items}
                    </Select.Group>
                  ) : (
                    <Fragment key={i}>{items}</Fragment>
                  );
                })}
              </Select.List>
            </Select.Popup>
          </Select.Positioner>
        </Select.Portal>
      </Select.Root>
    </CSPProvider>
  );
}
