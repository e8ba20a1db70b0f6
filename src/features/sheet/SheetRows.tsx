import type { ReactNode } from 'react';
import { RichHtml } from '@/components/drawing/marks/RichHtml';
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
    <SheetRow key={index} block={block} leads={isLead(block) || index >= blocks.length - WITH_SIGNATURES}>
      {block.kind === 'drawing' ? (
        <SheetDrawing block={block} format={DRAWING_FORMATS[system]} width={width} />
      ) : (
        <Working block={block} />
      )}
    </SheetRow>
  ));
}

/** Stays on the page of what follows it. */
const isLead = (block: SheetBlock): boolean =>
  block.kind === 'heading' || (block.kind === 'text' && block.text.endsWith(':'));

/** Signatures do not stand on a page alone: the last rows go with them. */
const WITH_SIGNATURES = 3;

interface SheetRowProps {
  readonly block: SheetBlock;
  readonly leads: boolean;
  readonly children: ReactNode;
}

function SheetRow({ block, leads, children }: SheetRowProps) {
  const { kind, source, results = [] } = block;
  return (
    <div className="cs-row" data-kind={kind} data-leads={leads || undefined}>
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
            {kind === 'caution' && <small>wording {block.version}</small>}
          </div>
        </>
      )}
    </div>
  );
}

const ResultFigure = ({ figure: { letter, value, unit } }: { figure: SheetFigure }) => (
  <p>
    {letter !== undefined && <Tex tex={letter} />}{' '}
    <span className="whitespace-nowrap">
      <b>{value}</b> <small>{unit}</small>
    </span>
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
      return (
        <p className={block.tone && `cs-${block.tone}`}>
          <RichHtml text={block.text} />
        </p>
      );
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
      return <p className="cs-caution">{block.text}</p>;
  }
}

/** TeX up to this length stands in one line with what it comes to. */
const ONE_LINE = 84;

function Formula({ block }: { block: Extract<SheetBlock, { kind: 'formula' }> }) {
  const { title, origin, symbols, numbers, note } = block;
  const isShort = numbers.startsWith('=') && symbols.length + numbers.length <= ONE_LINE;
  const lines = (isShort ? [symbols + numbers] : [symbols, numbers]).filter((line) => line !== '');
  return (
    <>
      <p className="cs-step">
        <RichHtml text={title} />
      </p>
      {origin !== undefined && <p className="cs-note">{origin}</p>}
      {lines.map((line) => (
        <p key={line} className="cs-formula">
          <Tex tex={line} />
        </p>
      ))}
      {note !== undefined && (
        <p className="cs-note">
          <RichHtml text={note} />
        </p>
      )}
    </>
  );
}
