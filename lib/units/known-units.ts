import type { Assembled } from "./assemble";
import { units } from "./catalogue";
import { quantityRows } from "./catalogue/quantities";
import { readUnit } from "./read-unit";

/** Units that forms offer and rows of the catalogue, read once: most texts that arrive are among them. */
export const knownUnits: ReadonlyMap<string, Assembled> = new Map(
  [...units.map((row) => row.symbol), ...quantityRows.flatMap(([, offered]) => offered.split(" "))].map(
    (text) => [text, readUnit(text)],
  ),
);
