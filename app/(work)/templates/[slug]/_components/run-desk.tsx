"use client";

import { useForm, useWatch } from "react-hook-form";
import { useMemo, useState } from "react";
import type { Definition, Input } from "@/lib/calculation/definition";
import { makeApplies } from "./applies";
import { buildRequest, fieldOfPointer } from "./build-request";
import { ChoiceInput } from "./choice-input";
import { CurvesPane, SectionPane } from "./figure-pane";
import { initialValues, type FieldState, type FormValues } from "./form-state";
import { LimitsPane } from "@/app/_components/run/limits-pane";
import type { MaterialChoice } from "./material-choice";
import { MaterialInput } from "./material-input";
import { NumberInput } from "./number-input";
import { PhoneBar } from "./phone-bar";
import { ResultsPane } from "./results-pane";
import { RunActions } from "./run-actions";
import { TableInput } from "./table-input";
import { useEvaluation } from "./use-evaluation";
import { WorkingTable, type WorkingRow } from "@/app/_components/run/working-table";

export interface RunDeskProps {
  slug: string;
  revision: number;
  /** Whether the page shows the current revision, so that calls may use the short address. */
  current: boolean;
  definition: Definition;
  working: WorkingRow[];
  materials: MaterialChoice[];
  mayKeep: boolean;
  /** Values to begin with, from a record. */
  initial?: FormValues;
  header: React.ReactNode;
  footer: React.ReactNode;
}

/** The main job: a form on the left, its live result, limits and figure on the right, the working below. */
export function RunDesk(props: RunDeskProps) {
  const { definition } = props;
  const form = useForm<FormValues>({ defaultValues: props.initial ?? initialValues(definition) });
  const values = useWatch({ control: form.control }) as FormValues;
  const [units, setUnits] = useState<Record<string, string>>({});
  const applies = useMemo(() => makeApplies(definition), [definition]);
  const shown = applies(values);
  const built = useMemo(
    () => buildRequest(definition, values, applies(values)),
    [definition, values, applies],
  );
  const run = useEvaluation({ slug: props.slug, revision: props.revision, built, units });

  const problems = run.problem?.problems ?? [];
  const faults: Record<string, string> = { ...built.faults };
  const general: string[] = [];
  for (const problem of problems) {
    const field = fieldOfPointer(definition, problem.pointer);
    if (field && shown(definition.inputs.find((input) => input.symbol === field.split(".")[0]) as Input))
      faults[field] ??= problem.message;
    else general.push(problem.message);
  }
  if (run.problem && problems.length === 0) general.push(run.problem.message);

  const set = (symbol: string) => (state: FieldState) =>
    form.setValue(`inputs.${symbol}`, state, { shouldDirty: true });
  const simple = definition.inputs.filter((input) => input.kind !== "table" && shown(input));
  const tables = definition.inputs.filter((input) => input.kind === "table" && shown(input));
  const waiting = definition.inputs
    .filter(({ symbol }) => Object.keys(faults).some((place) => place.split(".")[0] === symbol))
    .map(({ label }) => label);
  const evaluation = run.evaluation;
  const stale = Object.keys(built.faults).length > 0 || run.problem !== null;

  return (
    <>
      <div className="mb-5 flex flex-wrap items-end gap-x-6 gap-y-2 max-md:mb-4 max-md:px-4">
        {props.header}
        <RunActions
          slug={props.slug}
          revision={props.revision}
          current={props.current}
          built={built}
          values={values}
          units={units}
          mayKeep={props.mayKeep}
          ready={!stale && evaluation !== null}
          onReset={() => form.reset(initialValues(definition))}
        />
      </div>
      <div className="grid border border-rule bg-sheet max-md:border-x-0 md:grid-cols-[minmax(340px,428px)_minmax(0,1fr)]">
        <form
          className="order-1 min-w-0 border-rule max-md:border-b md:order-none md:border-r"
          onSubmit={(event) => event.preventDefault()}
          noValidate
          aria-label="Inputs"
        >
          <div className="px-6 pb-4 pt-5 max-md:px-4 max-md:pt-4">
            <h2 className="mb-2.5">Inputs</h2>
            {simple.map((input) => {
              const state = values.inputs[input.symbol];
              const common = { fault: faults[input.symbol] };
              if (input.kind === "number" && state?.kind === "number")
                return (
                  <NumberInput
                    key={input.symbol}
                    input={input}
                    state={state}
                    onChange={set(input.symbol)}
                    notice={built.notices[input.symbol]}
                    {...common}
                  />
                );
              if (input.kind === "choice" && state?.kind === "choice")
                return (
                  <ChoiceInput
                    key={input.symbol}
                    input={input}
                    state={state}
                    onChange={set(input.symbol)}
                    {...common}
                  />
                );
              if (input.kind === "material" && state?.kind === "material")
                return (
                  <MaterialInput
                    key={input.symbol}
                    input={input}
                    state={state}
                    materials={props.materials}
                    onChange={set(input.symbol)}
                    {...common}
                  />
                );
              return null;
            })}
          </div>
          {tables.map((input) => {
            const state = values.inputs[input.symbol];
            if (input.kind !== "table" || state?.kind !== "table") return null;
            const prefix = `${input.symbol}.`;
            const rowFaults = Object.fromEntries(
              Object.entries(faults).flatMap(([field, message]) =>
                field.startsWith(prefix) ? [[field.slice(prefix.length), message]] : [],
              ),
            );
            return (
              <TableInput
                key={input.symbol}
                input={input}
                state={state}
                materials={props.materials}
                onChange={set(input.symbol)}
                faults={rowFaults}
                fault={faults[input.symbol]}
              />
            );
          })}
        </form>
        <section className="contents min-w-0 md:block" aria-label="Run">
          <SectionPane
            definition={definition}
            evaluation={evaluation}
            materials={props.materials}
            stale={stale}
          />
          <div className="order-2 grid min-w-0 md:order-none md:max-lg:grid-cols-1 lg:grid-cols-[1.35fr_1fr]">
            <ResultsPane
              definition={definition}
              evaluation={evaluation}
              stale={stale}
              pending={run.pending}
              waiting={waiting}
              general={general}
              onUnit={(symbol, unit) => setUnits((present) => ({ ...present, [symbol]: unit }))}
            />
            <LimitsPane definition={definition} evaluation={evaluation} stale={stale} />
          </div>
          <CurvesPane slug={props.slug} revision={props.revision} definition={definition} built={built} />
        </section>
      </div>
      <WorkingTable rows={props.working} evaluation={evaluation} stale={stale} />
      {props.footer}
      <PhoneBar definition={definition} evaluation={evaluation} stale={stale} />
    </>
  );
}
