import { Checkbox } from '../../ui/controls.tsx';

/** Asked with the first factor: whether sessions that began without one go on. */
export function EndOthers({ checked, onChange }: { checked: boolean; onChange: (checked: boolean) => void }) {
  return (
    <Checkbox
      label="Sign out everywhere else"
      hint="Your other sessions began without a second factor."
      checked={checked}
      onChange={(event) => onChange(event.target.checked)}
    />
  );
}
