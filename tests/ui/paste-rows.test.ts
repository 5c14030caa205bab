import { describe, expect, it } from "vitest";
import { initialField, type TableState } from "@/app/(work)/templates/[slug]/_components/form-state";
import { rowsFromClipboard } from "@/app/(work)/templates/[slug]/_components/paste-rows";
import { layers } from "./form-fixtures";

const state = initialField(layers) as TableState;

/** Cells of the pasted rows as plain texts. */
function pasted(text: string, atRow = 0, atColumn = 0, present = state) {
  const rows = rowsFromClipboard(text, layers, present, atRow, atColumn);
  return rows?.map(({ cells }) =>
    layers.columns.map(({ symbol }) => {
      const cell = cells[symbol];
      if (cell?.kind === "number" || cell?.kind === "text") return cell.text;
      if (cell?.kind === "choice") return cell.option;
      return cell?.kind === "material" ? (cell.constant?.text ?? cell.slug) : null;
    }),
  );
}

describe("rows pasted from a spreadsheet", () => {
  it("fill the table from its first cell and add the rows that are missing", () => {
    expect(pasted("Steel\t5\tss304\tdry\nWool\t2 in\t0.045\tIn mortar\n")).toEqual([
      ["Steel", "5", "ss304", "dry"],
      ["Wool", "2 in", "0.045", "mortar"],
    ]);
  });

  it("begin at the cell that has the focus and leave the others", () => {
    expect(pasted("50\tss304\n60\tss304", 0, 1)).toEqual([
      ["Brick", "50", "ss304", "mortar"],
      ["", "60", "ss304", "dry"],
    ]);
  });

  it("read lines of every system and ignore the empty one at the end", () => {
    expect(pasted("A\t1\r\nB\t2\r\n")?.length).toBe(2);
    expect(pasted("A\t1\rB\t2")?.length).toBe(2);
  });

  it("stop at the most rows that the table takes, and leave cells beyond the last column out", () => {
    const rows = pasted("A\t1\tss304\tdry\tmore\n".repeat(9));
    expect(rows?.length).toBe(4);
    expect(rows?.[3]).toEqual(["A", "1", "ss304", "dry"]);
  });

  it("keep the option where the text names none", () => {
    expect(pasted("Brick\t114\tss304\twelded")?.[0]?.[3]).toBe("mortar");
  });

  it("keep rows below the block", () => {
    const two = { ...state, rows: [...state.rows, ...state.rows] };
    expect(pasted("New\t1", 0, 0, two)?.map((row) => row[0])).toEqual(["New", "Brick"]);
  });

  it("leave a single value to the browser", () => {
    expect(pasted("114")).toBeUndefined();
    expect(rowsFromClipboard("114\n", layers, state, 0, 1)).toBeNull();
  });
});
