interface ShapeFilterProps {
  readonly value: string;
  readonly onChange: (shape: string) => void;
}

/** Groups of shapes as the search knows them; "made" are outlines, values that are known, and round bars. */
const SHAPES = [
  { shape: 'i', word: 'I', path: 'M4 2h20v4H16v20h8v4H4v-4h8V6H4z' },
  { shape: 'channel', word: 'channel', path: 'M6 2h16v4H11v20h11v4H6z' },
  { shape: 'tee', word: 'tee', path: 'M4 2h20v4h-8v24h-4V6H4z' },
  { shape: 'angle', word: 'angle', path: 'M6 2h4v24h14v4H6z' },
  { shape: 'hollow', word: 'hollow', path: 'M5 2h18v28H5zM8.5 5.500v21h11v-21z' },
  { shape: 'timber', word: 'timber', path: 'M6 2h16v28H6zM6 9h16M6 16h16M6 23h16' },
  { shape: 'other', word: 'made', path: 'M3 2h22v4H17v20h8v4H3v-4h8V6H3zM7 6v20M21 6v20' },
] as const;

/** Shapes as they are drawn; a second press takes the choice back. */
export function ShapeFilter({ value, onChange }: ShapeFilterProps) {
  return (
    <fieldset className="mt-10 flex flex-wrap justify-between gap-x-2">
      <legend className="sr-only">Shape</legend>
      {SHAPES.map(({ shape, word, path }) => {
        const chosen = value === shape;
        return (
          <button
            key={shape}
            type="button"
            aria-pressed={chosen}
            onClick={() => onChange(chosen ? '' : shape)}
            className={`grid min-w-24 justify-items-center gap-3 pt-4 pb-13 text-note leading-14 max-md:min-h-44 ${chosen ? 'dimensioned font-semibold text-ink' : 'text-ink-2 hover:text-ink'}`}
          >
            <svg width="25" height="29" viewBox="0 0 28 32" aria-hidden="true">
              <path
                d={path}
                fillRule="evenodd"
                className={`stroke-ink ${chosen ? 'fill-steel' : 'fill-none'}`}
              />
            </svg>
            {word}
          </button>
        );
      })}
    </fieldset>
  );
}
