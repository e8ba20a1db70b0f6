import { Schematic } from '@/components/drawing/Schematic';
import { drawnName } from './names';
import type { SchematicView, TemplateRow } from './template';

interface GlanceProps {
  readonly row: Pick<TemplateRow, 'name' | 'summary' | 'youGive' | 'youGet'>;
  readonly schematic: SchematicView;
}

/** A template drawn with its letters, what it asks for and what it answers. */
export function TemplateGlance({ row, schematic }: GlanceProps) {
  return (
    <>
      <div className="[&_svg]:h-auto [&_svg]:max-w-full">
        <Schematic
          size="card"
          beam={schematic.beam}
          moment={schematic.moment}
          loadNames={schematic.loadNames.map(drawnName)}
          lengths={schematic.lengths.map(({ from, to, tex }) => ({ from, to, symbol: drawnName(tex) }))}
          label={`${row.name}, with its moment`}
        />
      </div>
      <p className="mt-6">{row.summary}</p>
      <dl className="mt-8 grid grid-cols-2 gap-x-16 text-schedule">
        <div>
          <dt className="font-semibold">You give</dt>
          <dd>{row.youGive}</dd>
        </div>
        <div>
          <dt className="font-semibold">You get</dt>
          <dd>{row.youGet}</dd>
        </div>
      </dl>
    </>
  );
}
