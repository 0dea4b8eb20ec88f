import { Formula } from '#src/components/notation/index.tsx';
import { Button } from '#src/components/ui/Button.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import { Segmented } from '#src/components/ui/Segmented.tsx';
import { Notice } from '#src/components/ui/StatusLine.tsx';
import { ActionsPanel } from './ActionsPanel.tsx';
import { CautionsPanel } from './CautionsPanel.tsx';
import { FormulaField } from './FormulaField.tsx';
import { IsomerChoice } from './IsomerChoice.tsx';
import { LabelPreview } from './LabelPreview.tsx';
import { relativesOf } from './label-facts.ts';
import { PreparationStrip } from './PreparationStrip.tsx';
import { Questions } from './Questions.tsx';
import { ReadingStrip } from './ReadingStrip.tsx';
import { besideEntity } from './reading.ts';
import { Part, SpinChoice } from './SpinChoice.tsx';
import { type RegisterForm as Form, useRegisterForm } from './useRegisterForm.ts';
import { useRelatives } from './useRelatives.ts';

/** Register a complex: one field, the reading as it is typed, the choices that only a person can make. */
export function RegisterForm({ labs }: { labs: { id: string; name: string }[] }) {
  const form = useRegisterForm(labs);
  const { draft, change, field, type, answer, attempt, read, open, salt, failure, chemistry } = form;
  return (
    <div className="grid items-start gap-x-7 gap-y-5 lg:grid-cols-[minmax(0,1fr)_320px]">
      <div className="flex min-w-0 flex-col gap-6">
        <div className="flex flex-col gap-3.5">
          <FormulaField field={field} onType={type} attempt={attempt} formula={draft.formula} />
          <Problem problem={failure} />
          {read && read.entities.length > 0 && <ReadingStrip reading={read} />}
          <Questions open={open} answered={draft.answered} onAnswer={answer} />
          {attempt?.kind !== 'read' && draft.formula.trim() === '' && <Examples onTake={type} />}
        </div>
        {read && read.entities.length > 1 && <DoubleSalt entities={read.entities} onTake={type} />}
        <ChemistryChoices form={form} />
        {read && salt && form.entity && (
          <PreparationStrip beside={besideEntity(read)} draft={draft} onChange={change} />
        )}
      </div>
      <aside aria-label="The record to be" className="flex min-w-0 flex-col gap-4">
        <Label form={form} labs={labs} />
        {chemistry && attempt && attempt.kind !== 'empty' && (
          <CautionsPanel cautions={read && read.entities.length > 0 ? read.cautions : null} sentences={chemistry} />
        )}
      </aside>
    </div>
  );
}

const EXAMPLES = ['[Co(en)2Cl2]Cl·0.5H2O', 'trans-[RuCl2(dppe)2]', 'K3[Cr(ox)3]·3H2O', 'Ni(CO)4'];

/** What can be typed, for who meets the field for the first time. */
function Examples({ onTake }: { onTake: (formula: string) => void }) {
  return (
    <div className="flex flex-wrap items-center gap-2 text-ink-soft">
      <span>Brackets for the entity; abbreviations as papers use them. For example</span>
      {EXAMPLES.map((formula) => (
        <Button key={formula} size="small" className="num" onClick={() => onTake(formula)}>
          {formula}
        </Button>
      ))}
    </div>
  );
}

/** Several complexes in one formula are several records. */
function DoubleSalt({ entities, onTake }: { entities: readonly { entity: string }[]; onTake: (f: string) => void }) {
  return (
    <Notice title="Several complexes:" tone="plain">
      this formula holds {entities.length}. Register each on its own; the salt is then a preparation that names them.
      <div className="mt-2.5 flex flex-wrap gap-2">
        {entities.map(({ entity }) => (
          <Button key={entity} onClick={() => onTake(entity)}>
            Take <Formula formula={entity} />
          </Button>
        ))}
      </div>
    </Notice>
  );
}

/** Geometry, isomer and spin state of the one entity. */
function ChemistryChoices({ form: { entity, settled, chemistry, choose } }: { form: Form }) {
  if (!entity || !settled || !chemistry) return null;
  if (entity.centres.length > 1)
    return (
      <Notice tone="plain">
        An entity of {entity.centres.length} centres is registered with its connectivity; geometry and isomer stay
        unstated.
      </Notice>
    );
  const { geometry, list, pick, spins, spinState } = settled;
  const shape = geometry === null ? null : chemistry.findGeometry(geometry);
  const nameOf = (symbol: string) => chemistry.findGeometry(symbol)?.name ?? symbol;
  return (
    <>
      <Part
        title="Geometry"
        note={`coordination number ${entity.coordinationNumber ?? 'not known'}; assumed until evidence is added`}
      >
        <Segmented
          label="Geometry"
          look="cards"
          options={[
            ...entity.geometries.map((symbol) => ({
              value: symbol,
              label: (
                <span>
                  {nameOf(symbol)}, <span className="num">{symbol}</span>
                </span>
              ),
            })),
            { value: 'none', label: 'not stated' },
          ]}
          value={geometry ?? 'none'}
          onChange={(chosen) => choose({ geometry: chosen === 'none' ? null : chosen })}
        />
      </Part>
      {shape && list && list.count > 0 && (
        <IsomerChoice
          key={`${entity.identity} ${geometry}`}
          list={list}
          geometry={shape}
          ligands={entity.ligands}
          pick={pick}
          onPick={(isomer) => choose({ isomer })}
          draw={chemistry.drawPolyhedron}
        />
      )}
      {shape && (!list || list.count === 0) && (
        <Notice tone="plain">
          {list
            ? 'This polyhedron has no room for these chelates: choose another, or leave the geometry unstated.'
            : 'The isomers of this set of ligands are not enumerated; the isomer stays unstated.'}
        </Notice>
      )}
      {spins.length > 1 && (
        <SpinChoice spins={spins} value={spinState} onChoose={(spin) => choose({ spinState: spin })} />
      )}
    </>
  );
}

/** The right column: the label with the actions under it, or what will stand there. */
function Label({ form, labs }: { form: Form; labs: { id: string; name: string }[] }) {
  const { entity, settled, chemistry, open } = form;
  const settledFormula = entity && open.length === 0 ? entity.entity : null;
  const { data, isFetching, isError } = useRelatives(settledFormula);
  if (!entity || !settled || !chemistry)
    return (
      <section aria-label="Specimen label" className="specimen px-[18px] pt-3.5 pb-[18px]">
        <p className="text-ink-soft">not yet registered</p>
        <p className="mt-1 mb-4 text-ink-soft">
          The label fills in as the formula is read: entity, ground term, symmetry, and whether it is here already.
        </p>
        <ActionsPanel form={form} labs={labs} />
      </section>
    );
  const nameOf = (symbol: string) => chemistry.findGeometry(symbol)?.name ?? symbol;
  const found = data && settledFormula ? relativesOf(data.items, settledFormula, settled, nameOf) : null;
  return (
    <LabelPreview
      entity={entity}
      settled={settled}
      geometryName={nameOf}
      relatives={{ found, isAsking: isFetching && !data, failed: isError }}
    >
      <ActionsPanel form={form} labs={labs} />
    </LabelPreview>
  );
}
