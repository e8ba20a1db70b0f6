import { type ReactNode, useId } from 'react';
import { ActionButton, type BlockAction } from './BlockActions';
import { type SheetStatus, StatusStamp } from './StatusStamp';

interface TitleStripProps {
  kind: string;
  title: string;
  status?: SheetStatus | undefined;
  statusWord?: string | undefined;
  reference?: string | undefined;
  revision?: string | undefined;
  revisionLabel?: string | undefined;
  action?: BlockAction | undefined;
}

/**
 * One line along the bottom edge that stands in for the title block while less than 35 % of it is in view.
 * `title-strip.ts` (loaded by the sheet layout) slides it; until then it is inert and out of sight.
 */
export function TitleStrip(props: TitleStripProps) {
  const { kind, title, status, reference, revision, revisionLabel = 'Rev', action } = props;
  return (
    <section
      data-title-strip
      data-screen-only
      inert
      suppressHydrationWarning
      aria-label="Title strip"
      className="fixed inset-x-0 bottom-0 z-20 flex h-54 translate-y-full items-stretch border-t-2 border-ink bg-paper transition-transform duration-120 ease-out inert:invisible data-on:translate-y-0"
    >
      <div className="flex min-w-0 flex-1 flex-col justify-center px-16 max-md:hidden">
        <span className="caps">{kind}</span>
        <b className="truncate font-semibold">{title}</b>
      </div>
      {reference && <Cell label="Ref">{reference}</Cell>}
      {revision && <Cell label={revisionLabel}>{revision}</Cell>}
      {status && (
        <Cell label="Status">
          <StatusStamp status={status} word={props.statusWord} />
        </Cell>
      )}
      {action && <StripAction action={action} />}
    </section>
  );
}

function StripAction({ action }: { action: BlockAction }) {
  const id = useId();
  return (
    <div className="grid border-l border-ink max-md:flex-1 [&_:is(button,a)]:px-28 [&_:is(button,a)]:text-[1rem]">
      <ActionButton action={action} tone="inverted" reasonId={id} />
      {action.reason !== undefined && (
        <span id={id} className="sr-only">
          {action.reason}
        </span>
      )}
    </div>
  );
}

function Cell({ label, children }: { label: string; children: ReactNode }) {
  return (
    <div className="flex flex-col justify-center border-l border-ink px-16 whitespace-nowrap max-md:px-12 max-md:first:border-l-0">
      <span className="caps">{label}</span>
      <span>{children}</span>
    </div>
  );
}
