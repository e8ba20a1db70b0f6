import type { ReactNode } from 'react';
import { DRAWING_FORMATS } from '@/components/drawing/quantity-format';
import type { UnitSystemName } from '@/engine/quantity';
import type { SheetBlock, SheetFigure } from '@/engine/sheet';
import { SheetDrawing } from './SheetDrawing';
import { CheckTable, SheetTable } from './SheetTable';
import { Tex } from './Tex';

interface SheetRowsProps {
  readonly blocks: readonly SheetBlock[];
  readonly system: UnitSystemName;
  /** Of the frame, px. */
  readonly width: number;
}

/** The blocks of a sheet, each a row of its three columns. The script of the page divides them between pages. */
export function SheetRows({ blocks, system, width }: SheetRowsProps) {
  return blocks.map((block, index) => (
    // biome-ignore lint/suspicious/noArrayIndexKey: a sheet is printed once and its blocks have no other identity
    <SheetRow key={index} block={block}>
      {block.kind === 'drawing' ? (
        <SheetDrawing block={block} format={DRAWING_FORMATS[system]} width={width} />
      ) : (
        <Working block={block} />
      )}
    </SheetRow>
  ));
}

/** Stays on the page of what follows it. */
const leads = (block: SheetBlock): boolean =>
  block.kind === 'heading' || (block.kind === 'text' && block.text.endsWith(':'));

function SheetRow({ block, children }: { block: SheetBlock; children: ReactNode }) {
  const { kind, source, results = [] } = block;
  return (
    <div className="cs-row" data-kind={kind} data-leads={leads(block) || undefined}>
      {kind === 'drawing' ? (
        children
      ) : (
        <>
          <div className="cs-source">{source}</div>
          <div className="cs-working">{children}</div>
          <div className="cs-result">
            {results.map((figure) => (
              <ResultFigure key={`${figure.letter} ${figure.value}`} figure={figure} />
            ))}
          </div>
        </>
      )}
    </div>
  );
}

const ResultFigure = ({ figure: { letter, value, unit } }: { figure: SheetFigure }) => (
  <p>
    {letter !== undefined && <Tex tex={letter} />} <b>{value}</b> <small>{unit}</small>
  </p>
);

function Working({ block }: { block: Exclude<SheetBlock, { kind: 'drawing' }> }) {
  switch (block.kind) {
    case 'heading':
      return (
        <h2>
          {block.number}&ensp;{block.title}
        </h2>
      );
    case 'text':
      return <p className={block.tone && `cs-${block.tone}`}>{block.text}</p>;
    case 'table':
      return <SheetTable block={block} />;
    case 'checks':
      return <CheckTable rows={block.rows} />;
    case 'formula':
      return <Formula block={block} />;
    case 'list':
      return (
        <ul className="cs-list">
          {block.items.map((item) => (
            <li key={item}>{item}</li>
          ))}
        </ul>
      );
    case 'caution':
      return (
        <p className="cs-caution">
          {block.text} <small>wording {block.version}</small>
        </p>
      );
  }
}

function Formula({ block }: { block: Extract<SheetBlock, { kind: 'formula' }> }) {
  const { title, symbols, numbers, note } = block;
  return (
    <>
      <p className="cs-step">{title}</p>
      <p className="cs-formula">
        <Tex tex={symbols} />
      </p>
      {numbers !== '' && (
        <p className="cs-formula">
          <Tex tex={numbers} />
        </p>
      )}
      {note !== undefined && <p className="cs-note">{note}</p>}
    </>
  );
}
