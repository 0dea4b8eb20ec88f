import { useEffect, useRef, useState } from 'react';
import { CautionsPanel } from '#src/components/complexes/register/CautionsPanel.tsx';
import { FormulaField } from '#src/components/complexes/register/FormulaField.tsx';
import { Questions } from '#src/components/complexes/register/Questions.tsx';
import { ReadingStrip } from '#src/components/complexes/register/ReadingStrip.tsx';
import { Button } from '#src/components/ui/Button.tsx';
import { Select, TextInput } from '#src/components/ui/controls.tsx';
import { getJson } from '#src/components/ui/http.ts';
import { Panel } from '#src/components/ui/Panel.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import { ChargeTransferFacts } from '../ChargeTransferFacts.tsx';
import { DilutionPanel } from './DilutionPanel.tsx';
import { PlannedBands } from './PlannedBands.tsx';
import { usePlan } from './usePlan.ts';

/** Before measuring: what a complex is likely to show, and which solutions show it well. */
export function PlanPage({ accession }: { accession: string | null }) {
  const page = usePlan();
  const { draft, change, reading, read, open, plan, cautions, solvents } = page;
  const field = useRef<HTMLInputElement>(null);
  useEffect(() => {
    // What was typed before the page woke up is not lost.
    if (field.current?.value) change({ formula: field.current.value, answered: [] });
  }, []);
  useEffect(() => {
    if (field.current && field.current.value !== draft.formula) field.current.value = draft.formula;
  }, [draft.formula]);
  const type = (formula: string) => change({ formula, answered: [], delta: '', B: '' });
  const told = plan?.told ?? null;
  return (
    <div className="flex flex-col gap-5">
      <div className="no-print grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_300px]">
        <FormulaField field={field as never} onType={type} attempt={reading.attempt} formula={draft.formula} />
        <FromAccession first={accession} onFormula={type} />
      </div>
      {read && read.entities.length > 0 && <ReadingStrip reading={read} />}
      <Questions
        open={open}
        answered={draft.answered}
        onAnswer={({ question, value }) =>
          change({
            answered: [...draft.answered.filter((one) => one.question.code !== question.code), { question, value }],
          })
        }
      />
      {plan?.refusal && <p className="max-w-prose text-ink-soft">{plan.refusal}</p>}
      {!read && reading.attempt?.kind !== 'refused' && (
        <p className="max-w-prose text-ink-soft">
          Type the formula of the complex that is to be measured. Bands, their usual strength and solutions to show them
          follow from the tables. All of it is estimated.
        </p>
      )}
      <div className="grid items-start gap-6 lg:grid-cols-[minmax(0,1fr)_300px]">
        <div className="flex min-w-0 flex-col gap-5">
          {told && <PlannedBands plan={told} colour={plan?.colour ?? null} geometry={plan!.complex!.geometry} />}
          {told && <DilutionPanel page={page} />}
          {plan?.charge && (plan.charge.lmct.length > 0 || plan.charge.mlct.length > 0) && (
            <Panel title="Charge transfer">
              <ChargeTransferFacts told={plan.charge} />
            </Panel>
          )}
        </div>
        <aside className="flex min-w-0 flex-col gap-5">
          {told && (
            <Panel title="Given values" className="no-print">
              <div className="grid grid-cols-2 gap-3">
                <TextInput
                  label="Δ in cm⁻¹"
                  figures
                  inputMode="numeric"
                  placeholder={told.delta === null ? '' : String(told.delta)}
                  value={draft.delta}
                  onChange={(event) => change({ delta: event.currentTarget.value })}
                />
                <TextInput
                  label="B in cm⁻¹"
                  figures
                  inputMode="numeric"
                  placeholder={told.B === null ? '' : String(told.B)}
                  value={draft.B}
                  onChange={(event) => change({ B: event.currentTarget.value })}
                />
              </div>
              <p className="mt-1.5 text-xs text-ink-soft">Left empty, they are estimated.</p>
              <Button className="mt-3 w-full" onClick={() => print()}>
                Print the plan
              </Button>
            </Panel>
          )}
          {read && (
            <Select
              label="Solvent"
              className="no-print"
              value={draft.solvent}
              onChange={(event) => change({ solvent: event.currentTarget.value })}
              options={solvents.map(({ name }) => ({ value: name, label: name }))}
            />
          )}
          {reading.chemistry && reading.attempt && reading.attempt.kind !== 'empty' && (
            <CautionsPanel cautions={cautions} sentences={reading.chemistry} />
          )}
        </aside>
      </div>
    </div>
  );
}

/** Takes the formula of a record in sight. */
function FromAccession({ first, onFormula }: { first: string | null; onFormula: (formula: string) => void }) {
  const [accession, setAccession] = useState(first ?? '');
  const [problem, setProblem] = useState<unknown>(null);
  const take = (of: string) =>
    getJson<{ formula: string }>(`/api/complexes/${encodeURIComponent(of.trim())}`).then(({ formula }) => {
      setProblem(null);
      onFormula(formula);
    }, setProblem);
  useEffect(() => {
    if (first) void take(first);
  }, [first]);
  return (
    <form
      className="flex flex-col gap-2"
      onSubmit={(event) => {
        event.preventDefault();
        if (accession.trim()) void take(accession);
      }}
    >
      <div className="flex items-end gap-2">
        <TextInput
          label="Or an accession"
          figures
          value={accession}
          placeholder="ZF000000-X"
          onChange={(event) => setAccession(event.currentTarget.value)}
          className="min-w-0 flex-1"
        />
        <Button type="submit">Take it</Button>
      </div>
      <Problem problem={problem} />
    </form>
  );
}
