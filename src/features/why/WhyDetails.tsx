import { useMemo } from 'react';
import { formatValue, numbersTex, type Subject, symbolsTex, type Trace } from '@/engine/why';
import { setTex } from '@/features/template/tex';
import { WideFormula } from '@/features/template/WideFormula';
import { paths } from '@/paths';
import type { Row } from './rows';
import { methodWords, sourcesOf } from './words';

interface WhyDetailsProps {
  readonly row: Row;
  readonly subject: Subject;
  readonly isMember: boolean;
  readonly onField: (symbol: string) => void;
}

/** The chosen number: its value, its formula with letters and with numbers, where it is printed, and the way there. */
export function WhyDetails({ row, subject, isMember, onField }: WhyDetailsProps) {
  const { trace } = row;
  const { how } = trace;
  const sources = sourcesOf(trace);
  return (
    <section
      aria-label="The chosen number"
      // Of one height, so that the outline stays where it is while it is gone through.
      className="h-[clamp(220px,38dvh,340px)] flex-none overflow-y-auto border-b-2 border-ink px-(--pad) py-12"
    >
      <div className="flex items-baseline gap-14">
        <h3 className="min-w-0 flex-1 text-zone font-semibold">{trace.label}</h3>
        <b className="text-value font-normal whitespace-nowrap">{formatValue(trace, subject.system)}</b>
      </div>
      <p className="text-note text-ink-2">{methodWords(trace)}</p>
      <Working row={row} subject={subject} />
      {how.kind === 'formula' && how.note !== '' && <p className="mt-6 text-schedule">{how.note}</p>}
      {how.kind === 'input' && <p className="mt-6 text-schedule">{inputWords(how)}</p>}
      {sources.map((source) => (
        <p key={source} className="mt-4 text-note text-ink-2 italic">
          {source}
        </p>
      ))}
      <Links how={how} subject={subject} isMember={isMember} onField={onField} />
    </section>
  );
}

function inputWords({ typed, isDefault, group, row }: Extract<Trace['how'], { kind: 'input' }>): string {
  const what = typed === null ? 'As given' : isDefault ? `The default: ${typed}` : `Typed: ${typed}`;
  const where = [group === null ? '' : `group ${group}`, row === null ? '' : `row ${row + 1}`];
  return [what, ...where].filter((part) => part !== '').join(', ');
}

function Working({ row: { name, trace }, subject }: Pick<WhyDetailsProps, 'row' | 'subject'>) {
  const lines = useMemo(() => {
    const [symbols, numbers] = [symbolsTex(trace), numbersTex(trace, subject.system)];
    const own = name === '' ? '' : `${name}=`;
    const all = [symbols === '' ? '' : `${own}${symbols}`, numbers === '' ? '' : `{}=${numbers}`];
    return all.filter((tex) => tex !== '').map((tex) => setTex(`\\displaystyle ${tex}`, false));
  }, [name, trace, subject]);
  return lines.map((html, index) => (
    <WideFormula
      // biome-ignore lint/suspicious/noArrayIndexKey: letters first, then numbers
      key={index}
      index={index}
      formulaOf={(at) => lines[at] ?? html}
      title={index === 0 ? 'with letters' : 'with numbers'}
      className="mt-8 overflow-x-auto overflow-y-hidden py-2 [&_.base]:my-3 [&_.katex]:text-[1.06em]!"
    />
  ));
}

interface LinksProps extends Pick<WhyDetailsProps, 'subject' | 'isMember' | 'onField'> {
  readonly how: Trace['how'];
}

function Links({ how, subject, isMember, onField }: LinksProps) {
  const look = 'link mt-6 inline-flex min-h-26 items-center pointer-coarse:min-h-44';
  if (how.kind === 'input' && how.parameter !== 'GA')
    return (
      <button type="button" className={look} onClick={() => onField(how.parameter)}>
        Go to its field
      </button>
    );
  if (how.kind === 'row')
    return (
      <a
        className={look}
        href={
          paths.section(how.table, how.designation) + (how.edition === null ? '' : `?edition=${how.edition}`)
        }
      >
        Open the section
      </a>
    );
  if (isMember && how.kind === 'formula' && how.method === 'expression')
    return (
      <a className={look} href={paths.templateRevision(subject.template.slug, subject.revision)}>
        Open the template
      </a>
    );
  return null;
}
