import { Combobox } from '@base-ui/react/combobox';
import { CSPProvider } from '@base-ui/react/csp-provider';
import { useQuery } from '@tanstack/react-query';
import { useEffect, useId, useRef, useState } from 'react';
import type { Page } from '../../contracts/common.ts';
import type { ComplexSummary } from '../../contracts/complexes.ts';
import type { FolioRecord } from '../../contracts/sharing.ts';
import { Formula } from '../notation/index.tsx';
import { CONTROL } from '../ui/Field.tsx';
import { getJson } from '../ui/http.ts';
import { Problem } from '../ui/Problem.tsx';
import { queryClient } from '../ui/query-client.ts';
import { StatusLine } from '../ui/StatusLine.tsx';
import type { useFolio } from './useFolio.ts';
import { useSettled } from './useSettled.ts';

interface Props {
  present: FolioRecord['items'];
  editItems: ReturnType<typeof useFolio>['editItems'];
}

/** A search among the complexes in sight; choosing one puts it into the folio with all its spectra. */
export function AddComplex({ present, editItems }: Props) {
  const id = useId();
  const [text, setText] = useState('');
  const [open, setOpen] = useState(false);
  const [added, setAdded] = useState<string | null>(null);
  const field = useRef<HTMLInputElement>(null);
  useEffect(() => {
    // What was typed before the page woke up is not lost.
    if (!field.current?.value) return;
    setText(field.current.value);
    setOpen(true);
  }, []);
  const asked = useSettled(text.trim(), 250);
  const found = useQuery(
    {
      queryKey: ['complexes', 'pick', asked],
      queryFn: ({ signal }) =>
        getJson<Page<ComplexSummary>>(`/api/complexes?${new URLSearchParams({ q: asked, limit: '12' })}`, signal),
      enabled: asked !== '',
    },
    queryClient,
  );
  const isIn = (accession: string) => present.some((item) => item.accession === accession);
  const items = asked === '' ? [] : (found.data?.items ?? []);
  const add = (chosen: ComplexSummary | null) => {
    if (!chosen) return;
    setAdded(null);
    editItems.mutate(
      { add: chosen.accession },
      {
        onSuccess: () => {
          setText('');
          setAdded(chosen.accession);
        },
      },
    );
  };
  return (
    <div className="mb-3 max-w-xl">
      <CSPProvider disableStyleElements>
        <Combobox.Root
          items={items}
          filter={null}
          value={null}
          onValueChange={(chosen: ComplexSummary | null) => add(chosen)}
          inputValue={text}
          open={open}
          onOpenChange={setOpen}
          // Closing or choosing would empty the field; what was typed stays until it was added.
          onInputValueChange={(next, { reason }) => reason === 'input-change' && setText(next)}
          itemToStringLabel={(item: ComplexSummary) => item.accession}
          isItemEqualToValue={(a: ComplexSummary, b: ComplexSummary) => a.accession === b.accession}
          autoHighlight
        >
          <label htmlFor={id} className="mb-1 block text-xs text-ink-soft">
            Add a complex
          </label>
          <Combobox.Input
            ref={field}
            id={id}
            placeholder="Accession, formula or ligand"
            className={CONTROL}
            disabled={editItems.isPending}
          />
          <Combobox.Portal>
            <Combobox.Positioner sideOffset={4} align="start" className="z-40">
              <Combobox.Popup className="max-h-80 w-(--anchor-width) overflow-y-auto rounded border border-hairline bg-glaze py-1 shadow-float">
                <Combobox.Empty>
                  <p className="px-3.5 py-2 text-ink-soft empty:hidden">{emptyText(asked, found.isFetching)}</p>
                </Combobox.Empty>
                <Combobox.List>
                  {(item: ComplexSummary) => (
                    <Combobox.Item
                      key={item.accession}
                      value={item}
                      disabled={isIn(item.accession)}
                      className="flex min-h-9 cursor-pointer items-center gap-4 px-3.5 py-1 outline-none data-disabled:text-ink-soft data-highlighted:bg-zaffre-wash"
                    >
                      <span className="num flex-none">{item.accession}</span>
                      <Formula formula={item.formula} className="min-w-0 truncate" />
                      <span className="ml-auto flex-none text-xs text-ink-soft">
                        {isIn(item.accession) ? 'in the folio' : item.lab.name}
                      </span>
                    </Combobox.Item>
                  )}
                </Combobox.List>
              </Combobox.Popup>
            </Combobox.Positioner>
          </Combobox.Portal>
        </Combobox.Root>
      </CSPProvider>
      <Problem problem={found.error} onRetry={() => void found.refetch()} />
      <StatusLine>{added && `${added} is in the folio`}</StatusLine>
    </div>
  );
}

function emptyText(asked: string, isSearching: boolean): string {
  if (asked === '') return 'Type an accession, a formula or a ligand.';
  return isSearching ? 'Searching…' : `Nothing in your sight fits "${asked}".`;
}
