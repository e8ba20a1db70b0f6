import { memo, type ReactNode } from 'react';
import { MarkdownHtml } from '@/components/ui/MarkdownHtml';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import type { Template } from '@/engine/template';
import { Why } from '@/features/why/Why';
import { WhyGrid } from '@/features/why/WhyGrid';
import { Formula } from './Formula';
import { type ProofLine, type ResultLine, type RuleLine, sourceText } from './lines';
import type { NotesHtml } from './page';

type Formulas = Readonly<Record<string, string>>;

const SIGNS = {
  holds: { sign: '✓', said: 'holds', tone: 'text-issued' },
  broken: { sign: '×', said: 'does not hold', tone: 'text-error' },
  unknown: { sign: '?', said: 'not known yet', tone: 'text-ochre-ink' },
} as const;

/** A rule that only remarks on something is no fault. */
const signOf = ({ state, severity }: RuleLine) =>
  state === 'broken' && severity !== 'block'
    ? { sign: '△', said: severity === 'note' ? 'note' : 'warning', tone: 'text-ochre-ink' }
    : SIGNS[state];

/** Each rule with its figure now, and what to do where it does not hold. */
export function Validity({
  rules,
  formulas,
}: {
  readonly rules: readonly RuleLine[];
  readonly formulas: Formulas;
}) {
  return (
    <ul className="border-t-2 border-ink">
      {rules.map((rule) => {
        const { sign, said, tone } = signOf(rule);
        return (
          <li
            key={rule.id}
            className="grid grid-cols-[20px_minmax(0,1fr)_auto] items-baseline gap-x-8 gap-y-2 border-b border-rule py-6"
          >
            <span className={`font-semibold ${tone}`}>
              <span aria-hidden="true">{sign}</span>
              <span className="sr-only">{said}</span>
            </span>
            <span>{rule.title}</span>
            <span className="text-right whitespace-nowrap [&_.katex]:text-[1em]!">
              {rule.figure && (
                <>
                  <Formula html={formulas[rule.figure.tex] ?? ''} /> = {rule.figure.text}
                </>
              )}
            </span>
            {rule.message && (
              <span className="col-span-2 col-start-2 text-note text-ink-2">{rule.message}</span>
            )}
          </li>
        );
      })}
    </ul>
  );
}

/** The proof cases with what was expected and what the engine finds. */
export const ProofCases = memo(function ProofCases({ cases }: { readonly cases: readonly ProofLine[] }) {
  return (
    <div className="grid gap-4">
      {cases.map(({ name, source, ok, fault, checks }) => (
        <details key={name} className="border-t border-rule">
          <summary className="flex min-h-28 cursor-pointer items-baseline gap-8 py-4 pointer-coarse:min-h-44">
            <span className={`font-semibold ${ok ? 'text-issued' : 'text-error'}`}>
              <span aria-hidden="true">{ok ? '✓' : '×'}</span>
              <span className="sr-only">{ok ? 'agrees' : 'disagrees'}</span>
            </span>
            <span className="min-w-0 flex-1">{name}</span>
            <span className="text-note whitespace-nowrap text-ink-2">
              {checks.length} {checks.length === 1 ? 'figure' : 'figures'}
            </span>
          </summary>
          {fault && <p className="text-note text-error">{fault}</p>}
          <table className="schedule mb-6">
            <thead>
              <tr>
                <th scope="col">Figure</th>
                <th scope="col" className="figure">
                  Expected
                </th>
                <th scope="col" className="figure">
                  Got
                </th>
              </tr>
            </thead>
            <tbody>
              {checks.map((check) => (
                <tr key={check.name + check.against}>
                  <td>{check.name}</td>
                  <td className="figure">{check.expected}</td>
                  <td className="figure">
                    {check.got} {check.ok ? '✓' : '×'}
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
          <p className="mb-8 text-note text-ink-2 italic">{source}</p>
        </details>
      ))}
    </div>
  );
});

interface ClosedFormsProps {
  readonly results: readonly ResultLine[];
  readonly formulas: Formulas;
}

/** The published closed forms at these values, beside which the solved figures stand; a source is named once for those it gives. */
export function ClosedForms({ results, formulas }: ClosedFormsProps) {
  return (
    <WhyGrid>
      <ul className="border-t-2 border-ink">
        {results.map(({ id, name, tex, formula, text, source }, index) => (
          <li key={id} className="border-b border-rule py-6">
            <div className="flex items-baseline gap-10">
              <span className="min-w-0 flex-1 text-schedule text-ink-2">{name}</span>
              <b className="font-semibold whitespace-nowrap">
                <Why question={() => ({ kind: 'closed form', id })}>{text}</Why>
              </b>
            </div>
            <div className="overflow-x-auto overflow-y-hidden py-3 [&_.katex]:text-[1em]!">
              <Formula html={formulas[`${tex} = ${formula}`] ?? ''} />
            </div>
            {source !== results[index + 1]?.source && (
              <p className="mt-2 text-note text-ink-2 italic">{source}</p>
            )}
          </li>
        ))}
      </ul>
    </WhyGrid>
  );
}

interface NotesProps {
  readonly sources: Template['sources'];
  readonly notes: NotesHtml;
}

/** When to use the template and when not, how it is solved, and where its formulas come from. */
export const Notes = memo(function Notes({ sources, notes }: NotesProps) {
  const { use, doNotUse, method, derivations } = notes;
  return (
    <div className="grid gap-12">
      <NoteList title="Use it for" items={use} />
      <NoteList title="Do not use it for" items={doNotUse} />
      <div>
        <h3 className="mb-2 font-semibold">Method</h3>
        <MarkdownHtml html={method} className="text-schedule" />
      </div>
      <div>
        <h3 className="mb-2 font-semibold">Sources</h3>
        {sources.map((source) => (
          <div key={source.id} className="mb-4 text-schedule">
            <p>{sourceText(source)}</p>
            {derivations[source.id] !== undefined && (
              <details>
                <summary className="link min-h-26 cursor-pointer">How it follows</summary>
                <MarkdownHtml html={derivations[source.id] ?? ''} className="mt-2 text-ink-2" />
              </details>
            )}
          </div>
        ))}
      </div>
    </div>
  );
});

function NoteList({ title, items }: { readonly title: string; readonly items: readonly string[] }) {
  return (
    <div>
      <h3 className="mb-2 font-semibold">{title}</h3>
      <ul className="grid list-disc gap-2 pl-18 text-schedule">
        {items.map((item) => (
          <li key={item}>
            <MarkdownHtml html={item} />
          </li>
        ))}
      </ul>
    </div>
  );
}

export const proofNote = (cases: readonly ProofLine[]): string =>
  `${cases.filter(({ ok }) => ok).length} of ${cases.length} agree`;

export const Zone = ({ letter, title, note, children }: ZoneProps) => (
  <section className="zone">
    <ZoneHeading letter={letter} note={note}>
      {title}
    </ZoneHeading>
    {children}
  </section>
);

interface ZoneProps {
  readonly letter: string;
  readonly title: string;
  readonly note?: string | undefined;
  readonly children: ReactNode;
}
