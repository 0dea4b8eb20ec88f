import { useMutation } from '@tanstack/react-query';
import { type FormEvent, useState } from 'react';
import type { LabPatch, LabRecord } from '../../contracts/sharing.ts';
import { Button } from '../ui/Button.tsx';
import { Checkbox, TextArea, TextInput } from '../ui/controls.tsx';
import { getVersioned, sendJson } from '../ui/http.ts';
import { Panel } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { ProblemError } from '../ui/problem-error.ts';
import { queryClient } from '../ui/query-client.ts';
import { StatusLine } from '../ui/StatusLine.tsx';

/** Name, place, the rule of attesting and whether it is a facility, for leads of the lab. */
export function LabSettings({ lab }: { lab: LabRecord }) {
  const [form, setForm] = useState({
    name: lab.name,
    place: lab.place ?? '',
    description: lab.description ?? '',
    outsideAttest: lab.outsideAttest,
    facility: lab.facility,
  });
  const url = `/api/labs/${lab.id}`;
  const save = useMutation(
    {
      mutationFn: async () => {
        const { data, etag } = await getVersioned<LabRecord>(url);
        const isStale = (['name', 'place', 'description', 'outsideAttest', 'facility'] as const).some(
          (field) => data[field] !== lab[field],
        );
        if (isStale) {
          queryClient.setQueryData(['lab', lab.id], data);
          throw new ProblemError(
            412,
            'Somebody changed this lab meanwhile',
            'The new values stand above. Save again to replace them by yours.',
          );
        }
        const patch: LabPatch = { ...form, place: form.place || null, description: form.description || null };
        return sendJson<LabRecord>('PATCH', url, patch, { ifMatch: etag });
      },
      onSuccess: (changed) => queryClient.setQueryData(['lab', lab.id], changed),
    },
    queryClient,
  );
  const change = (part: Partial<typeof form>) => {
    save.reset();
    setForm((now) => ({ ...now, ...part }));
  };
  const submit = (event: FormEvent) => {
    event.preventDefault();
    save.mutate();
  };
  const nameFault = save.error instanceof ProblemError ? save.error.about('name') : undefined;
  return (
    <Panel title="Settings">
      <form onSubmit={submit} className="flex flex-col gap-4" aria-label="Settings">
        <TextInput
          label="Name"
          required
          maxLength={200}
          error={nameFault}
          value={form.name}
          onChange={(event) => change({ name: event.target.value })}
        />
        <TextInput
          label="Place"
          maxLength={200}
          value={form.place}
          onChange={(event) => change({ place: event.target.value })}
        />
        <TextArea
          label="Description"
          maxLength={2000}
          value={form.description}
          onChange={(event) => change({ description: event.target.value })}
        />
        <Checkbox
          label="Contributors of other labs may attest"
          hint="Bands measured by this lab. Leads always may; who proposed a band never."
          checked={form.outsideAttest}
          onChange={(event) => change({ outsideAttest: event.target.checked })}
        />
        <Checkbox
          label="Facility"
          hint="Measures what other labs made. Everybody sees it; it changes nobody’s rights."
          checked={form.facility}
          onChange={(event) => change({ facility: event.target.checked })}
        />
        {!nameFault && <Problem problem={save.error} />}
        <div className="flex items-center gap-3">
          <Button type="submit" disabled={save.isPending}>
            Save
          </Button>
          <StatusLine>{save.isSuccess && 'Saved'}</StatusLine>
        </div>
      </form>
    </Panel>
  );
}
