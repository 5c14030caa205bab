"use client";

import { useState } from "react";
import { Button, TextButton } from "@/app/_components/ui/button";
import { Dialog } from "@/app/_components/ui/dialog";
import { TextArea } from "@/app/_components/ui/text-field";
import type { TableInput } from "@/lib/calculation/definition";

/** Rows from a spreadsheet: a place to paste them, in the order of the columns. */
export function PasteDialog({ input, onPaste }: { input: TableInput; onPaste: (text: string) => boolean }) {
  const [open, setOpen] = useState(false);
  const [text, setText] = useState("");
  const take = () => {
    // A trailing tab makes a single value a block of one cell.
    onPaste(text.includes("\t") || text.includes("\n") ? text : `${text}\t`);
    setText("");
    setOpen(false);
  };
  return (
    <Dialog
      open={open}
      onOpenChange={setOpen}
      trigger={<TextButton>Paste from a table</TextButton>}
      title="Paste rows"
      description={`Copy the cells in a spreadsheet and paste them here, columns in this order: ${input.columns.map((column) => column.label).join(", ")}. A cell may carry its unit, such as 2 in.`}
    >
      <TextArea
        label="Rows"
        value={text}
        onChange={(event) => setText(event.target.value)}
        rows={8}
        maxLength={100_000}
        className="num text-[13px]"
      />
      <div className="flex justify-end gap-2">
        <Button onClick={() => setOpen(false)}>Cancel</Button>
        <Button tone="main" onClick={take} disabled={text.trim() === ""}>
          Fill the table
        </Button>
      </div>
    </Dialog>
  );
}
