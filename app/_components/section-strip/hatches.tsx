import type { Hatch } from "@/lib/sheet/section-model";

/**
 * Hatching by class of material, in the manner of technical drawings: metal in close diagonals, masonry in wide ones,
 * refractory crossed, insulation in waves, polymers in a lattice, fluids in dashes. Lines only, so that they survive black and white.
 */
export function HatchDefinitions({ id }: { id: string }) {
  return (
    <>
      <pattern
        id={`${id}-metal`}
        width="6"
        height="6"
        patternUnits="userSpaceOnUse"
        patternTransform="rotate(45)"
      >
        <path d="M0 0V6" stroke="var(--ink)" strokeWidth="1.5" />
      </pattern>
      <pattern
        id={`${id}-masonry`}
        width="11"
        height="11"
        patternUnits="userSpaceOnUse"
        patternTransform="rotate(45)"
      >
        <path d="M0 0V11" stroke="var(--hatch)" strokeWidth="1.1" />
      </pattern>
      <pattern
        id={`${id}-refractory`}
        width="12"
        height="12"
        patternUnits="userSpaceOnUse"
        patternTransform="rotate(45)"
      >
        <path d="M0 0V12M0 6H12" stroke="var(--hatch)" strokeWidth=".9" fill="none" />
      </pattern>
      <pattern id={`${id}-insulation`} width="24" height="14" patternUnits="userSpaceOnUse">
        <path
          d="M0 7C4 0 8 0 12 7S20 14 24 7"
          fill="none"
          stroke="var(--hatch)"
          strokeWidth=".9"
          opacity=".85"
        />
      </pattern>
      <pattern
        id={`${id}-polymer`}
        width="8"
        height="8"
        patternUnits="userSpaceOnUse"
        patternTransform="rotate(45)"
      >
        <path d="M0 0V8M4 0V3" stroke="var(--hatch)" strokeWidth=".9" />
      </pattern>
      <pattern id={`${id}-fluid`} width="18" height="10" patternUnits="userSpaceOnUse">
        <path d="M1 3h9M10 8h7" stroke="var(--hatch)" strokeWidth=".9" opacity=".8" />
      </pattern>
    </>
  );
}

/** A small square of a hatching, beside a layer's name. */
export function HatchSwatch({ hatch, id }: { hatch: Hatch; id: string }) {
  return (
    <svg width="26" height="26" viewBox="0 0 26 26" className="block border border-rule" aria-hidden="true">
      <defs>
        <HatchDefinitions id={id} />
      </defs>
      <rect width="26" height="26" fill={`url(#${id}-${hatch})`} />
    </svg>
  );
}
