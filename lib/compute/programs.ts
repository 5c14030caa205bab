import { type CompiledMaterial, compileMaterial } from "@/lib/calculation/compiled-material";
import type { Definition } from "@/lib/calculation/definition";
import { type MaterialSnapshots, type Prepared, prepare } from "@/lib/calculation/execute";
import type { Material } from "@/lib/calculation/material";
import { Lru } from "./lru";

const mostPrograms = 500;

/**
 * Compiled programs by definition hash and compiled materials by their content object; the same in the server and in
 * each worker. Compiled materials go when nobody holds their material any more.
 */
export class Programs {
  private readonly prepared = new Lru<Prepared>(mostPrograms);
  private readonly materials = new WeakMap<Material, CompiledMaterial>();

  /** The program of a hash when it is known. */
  known(hash: string): Prepared | undefined {
    return this.prepared.get(hash);
  }

  /** Throws `CodedError` `definition-invalid`. */
  of(hash: string, definition: Definition): Prepared {
    const known = this.prepared.get(hash);
    if (known) return known;
    const made = prepare(definition);
    this.prepared.set(hash, made);
    return made;
  }

  /** The same snapshots with their compiled materials beside them. */
  withCompiled(snapshots: MaterialSnapshots): MaterialSnapshots {
    return Object.fromEntries(
      Object.entries(snapshots).map(([name, snapshot]) => {
        let compiled = this.materials.get(snapshot.material);
        if (!compiled || compiled.slug !== snapshot.slug || compiled.revision !== snapshot.revision) {
          compiled = compileMaterial(snapshot.material, snapshot.slug, snapshot.revision);
          this.materials.set(snapshot.material, compiled);
        }
        return [name, { ...snapshot, compiled }];
      }),
    );
  }
}
