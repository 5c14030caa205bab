"use client";

import { useMutation } from "@tanstack/react-query";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { ApiProblem, callApi } from "@/app/_components/api-client";
import { NumberText } from "@/app/_components/number-text";
import { Button, ButtonLink } from "@/app/_components/ui/button";
import { Dialog } from "@/app/_components/ui/dialog";
import { TextArea } from "@/app/_components/ui/text-field";
import { paths } from "@/lib/core/paths";
import type { Deviation, RecordView, Rerun } from "@/lib/records/schemas";

interface Props {
  record: RecordView;
  labels: Readonly<Record<string, string>>;
  mayVoid: boolean;
}

/** What one does with a record: run it again, take its inputs to the form, declare it void. */
export function RecordActions({ record, labels, mayVoid }: Props) {
  return (
    <div className="ml-auto flex flex-wrap gap-2 max-md:ml-0 max-md:w-full">
      <RunAgain record={record} labels={labels} />
      <ButtonLink href={`${paths.template(record.template)}?record=${record.number}`}>
        Open in the form
      </ButtonLink>
      {mayVoid ? <VoidDialog record={record} /> : null}
    </div>
  );
}

function RunAgain({ record }: Omit<Props, "mayVoid">) {
  const [open, setOpen] = useState(false);
  const rerun = useMutation({
    mutationFn: (on: "record" | "current") =>
      callApi<Rerun>(`/records/${record.number}/rerun`, { body: { on } }),
  });
  const problem = rerun.error instanceof ApiProblem ? rerun.error.message : null;
  return (
    <Dialog
      open={open}
      onOpenChange={(next) => {
        setOpen(next);
        if (next) rerun.mutate("record");
      }}
      trigger={<Button>Run again</Button>}
      title="Run again"
      description={`With revision ${record.revision} of the template and the materials of this record. Nothing is kept.`}
    >
      <div role="status" aria-live="polite">
        {rerun.isPending ? <p className="text-muted">Running …</p> : null}
        {problem ? <p className="text-fault">{problem}</p> : null}
        {rerun.data ? (
          <>
            <p className="mb-3 font-[620]">
              {rerun.data.same
                ? "Same digits in every result."
                : rerun.data.on === "current"
                  ? `Revision ${rerun.data.after.revision} gives other results.`
                  : "The results differ. Report this to a senior engineer: the engine or Node.js has changed since."}
            </p>
            <DeviationTable deviations={rerun.data.deviations} />
          </>
        ) : null}
      </div>
      <div className="mt-4 flex flex-wrap justify-end gap-2">
        <Button onClick={() => rerun.mutate("current")} disabled={rerun.isPending}>
          On the current revision
        </Button>
        <Button tone="main" onClick={() => setOpen(false)}>
          Close
        </Button>
      </div>
    </Dialog>
  );
}

function Value({ value }: { value: Deviation["before"] }) {
  if (value === null) return <>{"\u2013"}</>;
  const numbers = value.values ?? (value.value === undefined ? [] : [value.value]);
  return (
    <>
      {numbers.map((number, index) => (
        <span key={index} className="ml-2 first:ml-0">
          <NumberText value={number} digits={6} />
        </span>
      ))}{" "}
      <span className="font-sans text-muted">{value.unit === "1" ? "" : value.unit}</span>
    </>
  );
}

function DeviationTable({ deviations }: { deviations: readonly Deviation[] }) {
  return (
    <div className="overflow-x-auto">
      <table className="w-full border-collapse text-[13px]">
        <thead>
          <tr className="text-left text-[12px] text-muted">
            <th className="py-1 pr-3 font-normal">Result</th>
            <th className="py-1 pr-3 text-right font-normal">Record</th>
            <th className="py-1 pr-3 text-right font-normal">Now</th>
            <th className="py-1 text-right font-normal">Difference</th>
          </tr>
        </thead>
        <tbody>
          {deviations.map((deviation) => (
            <tr key={deviation.symbol} className="border-t border-soft align-baseline">
              <th scope="row" className="num py-1 pr-3 text-left font-normal">
                {deviation.symbol}
              </th>
              <td className="num py-1 pr-3 text-right">
                <Value value={deviation.before} />
              </td>
              <td className="num py-1 pr-3 text-right">
                <Value value={deviation.after} />
              </td>
              <td className="num py-1 text-right">
                {deviation.absolute === null ? (
                  "not comparable"
                ) : deviation.absolute === 0 ? (
                  "0"
                ) : (
                  <NumberText value={deviation.absolute} digits={3} />
                )}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

function VoidDialog({ record }: { record: RecordView }) {
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const [reason, setReason] = useState("");
  const voiding = useMutation({
    mutationFn: () =>
      callApi<RecordView>(`/records/${record.number}/void`, { body: { reason: reason.trim() } }),
    onSuccess: () => {
      setOpen(false);
      router.refresh();
    },
  });
  const problem = voiding.error instanceof ApiProblem ? voiding.error.message : null;
  return (
    <Dialog
      open={open}
      onOpenChange={setOpen}
      trigger={<Button tone="fault">Declare void</Button>}
      title={`Declare ${record.number} void`}
      description="The record stays, with its number and your reason, and is marked void everywhere. This cannot be taken back."
    >
      <form
        onSubmit={(event) => {
          event.preventDefault();
          voiding.mutate();
        }}
      >
        <TextArea
          label="Reason"
          value={reason}
          onChange={(event) => setReason(event.target.value)}
          required
          maxLength={600}
        />
        <p role="alert" className="text-[13px] text-fault">
          {problem}
        </p>
        <div className="mt-2 flex justify-end gap-2">
          <Button onClick={() => setOpen(false)}>Cancel</Button>
          <Button tone="fault" type="submit" disabled={reason.trim() === "" || voiding.isPending}>
            Declare void
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
