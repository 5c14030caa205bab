interface UnitSelectProps {
  value: string;
  units: readonly string[];
  label: string;
  onPick: (unit: string) => void;
  className?: string;
}

/** A unit as text, which opens a list of units of the same quantity. */
export function UnitSelect({ value, units, label, onPick, className = "" }: UnitSelectProps) {
  const offered = units.includes(value) ? units : [value, ...units];
  return (
    <span className={`group relative inline-flex min-w-0 items-center ${className}`}>
      <select
        value={value}
        onChange={(event) => onPick(event.target.value)}
        aria-label={label}
        className="h-full min-h-6 w-full min-w-0 appearance-none [field-sizing:content] rounded bg-transparent pr-3 text-muted group-hover:text-ink max-md:min-h-11 max-md:min-w-11"
      >
        {offered.map((unit) => (
          <option key={unit} value={unit} className="bg-sheet text-ink">
            {unit === "1" ? "\u2013" : unit}
          </option>
        ))}
      </select>
      <svg
        width="7"
        height="5"
        viewBox="0 0 7 5"
        aria-hidden="true"
        className="pointer-events-none absolute right-0.5 text-hatch group-hover:text-ink"
      >
        <path d="M0 .5h7L3.5 4.5z" fill="currentColor" />
      </svg>
    </span>
  );
}
