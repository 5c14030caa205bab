"use client";

import { useMutation } from "@tanstack/react-query";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { ApiProblem, callApi } from "@/app/_components/api-client";
import { CopyBlock } from "@/app/_components/copy-block";
import { curlSnippet } from "@/app/_components/snippets";
import { Button, ButtonLink } from "@/app/_components/ui/button";
import { Dialog } from "@/app/_components/ui/dialog";
import { TextArea, TextField } from "@/app/_components/ui/text-field";
import { paths } from "@/lib/core/paths";
import type { BuiltRequest } from "./build-request";
import type { FormValues } from "./form-state";

interface Props {
  slug: string;
  revision: number;
  current: boolean;
  built: BuiltRequest;
  values: FormValues;
  units: Record<string, string>;
  mayKeep: boolean;
  ready: boolean;
  onReset: () => void;
}

/** What one does with a run: keep it as a record, take it as a call, begin again. */
export function RunActions(props: Props) {
  return (
    <div className="ml-auto flex flex-wrap gap-2 max-md:ml-0 max-md:w-full">
      <Button onClick={props.onReset}>Back to defaults</Button>
      <CallDialog {...props} />
      {props.mayKeep ? <KeepDialog {...props} /> : null}
    </div>
  );
}

function CallDialog({ slug, revision, current, built, units }: Props) {
  const [open, setOpen] = useState(false);
  const origin = typeof window === "undefined" ? "" : window.location.origin;
  return (
    <Dialog
      open={open}
      onOpenChange={setOpen}
      trigger={<Button>As a call</Button>}
      title="The same run over REST"
      description="Filled with what the form holds now. Inputs that are not sent keep their defaults. Put an API key into COLDFACE_KEY first."
    >
      {Object.keys(built.faults).length > 0 ? (
        <p className="text-fault">The form has values that cannot be read; mend them first.</p>
      ) : (
        <CopyBlock
          label="curl"
          text={curlSnippet({
            origin,
            slug,
            revision: current ? null : revision,
            inputs: built.inputs,
            units,
          })}
        />
      )}
      <div className="mt-4 flex justify-end gap-2">
        <ButtonLink href={paths.interfaces}>About the interfaces</ButtonLink>
        <Button tone="main" onClick={() => setOpen(false)}>
          Close
        </Button>
      </div>
    </Dialog>
  );
}

function KeepDialog({ slug, revision, built, values, units, ready }: Props) {
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const [title, setTitle] = useState("");
  const [tags, setTags] = useState("");
  const [note, setNote] = useState("");
  // One key for one intention: a second press after a lost answer finds the first record instead of making another.
  const [intention, setIntention] = useState("");

  const keep = useMutation({
    mutationFn: () =>
      callApi<{ number: string }>(`/templates/${slug}/revisions/${revision}/records`, {
        idempotencyKey: intention,
        body: {
          inputs: built.inputs,
          units,
          origins: Object.fromEntries(
            Object.entries(values.inputs).flatMap(([symbol, state]) =>
              symbol in built.inputs ? [[symbol, state.origin]] : [],
            ),
          ),
          title: title.trim() === "" ? undefined : title.trim(),
          note: note.trim() === "" ? undefined : note.trim(),
          tags: tags
            .split(",")
            .map((tag) => tag.trim())
            .filter((tag) => tag !== ""),
        },
      }),
    onSuccess: (record) => {
      router.push(paths.record(record.number));
    },
  });
  const problem = keep.error instanceof ApiProblem ? keep.error : null;
  const faultAt = (pointer: string) =>
    problem?.problems.find((entry) => entry.pointer.startsWith(pointer))?.message;
  const general = problem?.problems.filter(
    (entry) => !["#/title", "#/tags", "#/note"].some((pointer) => entry.pointer.startsWith(pointer)),
  );

  return (
    <Dialog
      open={open}
      onOpenChange={(next) => {
        setOpen(next);
        if (next) {
          setIntention(crypto.randomUUID());
          keep.reset();
        }
      }}
      trigger={
        <Button tone="main" disabled={!ready} className="max-md:flex-1">
          Keep record
        </Button>
      }
      title="Keep this run as a record"
      description="A record holds the inputs as typed, the results, the revision and the materials. It is never changed afterwards."
    >
      <form
        onSubmit={(event) => {
          event.preventDefault();
          keep.mutate();
        }}
      >
        <TextField
          label="Title"
          hint="Optional: what this run is for."
          value={title}
          onChange={(event) => setTitle(event.target.value)}
          maxLength={120}
          fault={faultAt("#/title")}
        />
        <TextField
          label="Tags"
          hint="Optional: equipment numbers or projects, separated by commas."
          value={tags}
          onChange={(event) => setTags(event.target.value)}
          maxLength={400}
          fault={faultAt("#/tags")}
        />
        <TextArea
          label="Note"
          hint="Optional."
          value={note}
          onChange={(event) => setNote(event.target.value)}
          maxLength={2000}
          fault={faultAt("#/note")}
        />
        <div role="alert" className="text-[13px] text-fault">
          {problem && problem.problems.length === 0 ? <p>{problem.message}</p> : null}
          {general?.map((entry) => (
            <p key={entry.pointer + entry.code}>{entry.message}</p>
          ))}
          {problem && general && general.length > 0 ? <p>Nothing was kept.</p> : null}
        </div>
        <div className="mt-4 flex justify-end gap-2">
          <Button onClick={() => setOpen(false)}>Cancel</Button>
          <Button tone="main" type="submit" disabled={keep.isPending || keep.isSuccess}>
            {keep.isPending || keep.isSuccess ? "Keeping …" : "Keep record"}
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
