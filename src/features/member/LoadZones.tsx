import type { ReactNode } from 'react';
import { RichHtml } from '@/components/drawing/marks/RichHtml';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import type { ArrangementNamer } from '@/engine/combination';
import type { Governing } from '@/engine/envelope';
import type { Load } from '@/engine/model';
import { letteredSupports } from '@/engine/model';
import { formatFor, type UnitSystemName } from '@/engine/quantity';
import type { Acting } from '@/engine/why';
import { drawnName } from '@/features/template/names';
import { actingGroup, governingActing } from '@/features/why/member-loading';
import { Why } from '@/features/why/Why';
import { WhyGrid } from '@/features/why/WhyGrid';
import type { MemberEvaluation } from './evaluate';
import { groupName } from './views';

interface ZoneProps {
  readonly evaluation: MemberEvaluation | null;
  readonly system: UnitSystemName;
}

const KINDS = { point: 'point', line: 'line', couple: 'couple', curvature: 'curvature' } as const;

function loadText(load: Load, system: UnitSystemName): string {
  switch (load.kind) {
    case 'point':
      return `${formatFor(load.p, 'force', system)} at ${formatFor(load.at, 'position', system)}`;
    case 'line': {
      const at = `${formatFor(load.from, 'position', system)} to ${formatFor(load.to, 'position', system)}`;
      const [w0, w1] = [load.w0, load.w1].map((w) => formatFor(w, 'line_load', system));
      return `${w0 === w1 ? w0 : `${w0} to ${w1}`}, ${at}`;
    }
    case 'couple':
      return `${formatFor(load.m, 'moment', system)} at ${formatFor(load.at, 'position', system)}`;
    case 'curvature':
      return formatFor(load.kappa, 'curvature', system);
  }
}

/** Every load with the group that it belongs to, unfactored. */
export function LoadGroupsZone({ evaluation, system }: ZoneProps) {
  return (
    <section className="zone">
      <ZoneHeading letter="D" note="unfactored, down positive">
        Load groups
      </ZoneHeading>
      {evaluation && (
        <WhyGrid>
          <table className="schedule">
            <thead>
              <tr>
                <th scope="col">Group</th>
                <th scope="col">Kind</th>
                <th scope="col">Load</th>
              </tr>
            </thead>
            <tbody>
              {evaluation.beam.loads.map((load, index) => {
                const name = evaluation.instance.loadNames[index];
                return (
                  // biome-ignore lint/suspicious/noArrayIndexKey: a load has no identity but its place in the beam
                  <tr key={index}>
                    <th scope="row">
                      {groupName(load.group ?? '')}{' '}
                      <i className="font-normal">{name && <RichHtml text={drawnName(name.tex)} />}</i>
                    </th>
                    <td>{KINDS[load.kind]}</td>
                    <td>
                      <Why question={() => ({ kind: 'load', index })}>{loadText(load, system)}</Why>
                    </td>
                  </tr>
                );
              })}
            </tbody>
          </table>
        </WhyGrid>
      )}
    </section>
  );
}

/** What gives a figure, or its range, in the second line of its cell. */
const Under = ({ children }: { readonly children: ReactNode }) => (
  <span className="block text-note font-normal text-ink-2">{children}</span>
);

/** Reactions of each group alone, so that the next member can combine them afresh, with the most and least. */
export function ReactionsZone({ evaluation, system }: ZoneProps) {
  return (
    <section className="zone">
      <ZoneHeading letter="F" note="unfactored, by group, so that the next member can combine them afresh">
        Reactions
      </ZoneHeading>
      {evaluation && (
        // biome-ignore lint/a11y/noNoninteractiveTabindex: a wide table is scrolled by the keyboard too
        <section aria-label="Reactions" tabIndex={0} className="overflow-x-auto">
          <WhyGrid>
            <table className="schedule">
              <thead>
                <tr>
                  <th scope="col">Support</th>
                  {evaluation.groups.map(({ group }) => (
                    <th key={group} scope="col" className="figure">
                      {groupName(group)}
                    </th>
                  ))}
                  <th scope="col" className="figure">
                    All
                  </th>
                  <th scope="col" className="figure">
                    Most<small>strength</small>
                  </th>
                  <th scope="col" className="figure">
                    Least<small>strength</small>
                  </th>
                </tr>
              </thead>
              <tbody>
                {reactionRows(evaluation).map((row) => (
                  <ReactionRow key={row.name} row={row} evaluation={evaluation} system={system} />
                ))}
              </tbody>
            </table>
          </WhyGrid>
        </section>
      )}
    </section>
  );
}

interface ReactionRowProps {
  readonly evaluation: MemberEvaluation;
  readonly row: ReturnType<typeof reactionRows>[number];
  readonly system: UnitSystemName;
}

function ReactionRow({ row, evaluation, system }: ReactionRowProps) {
  const { name, purpose, groups, total, most, least, support, component } = row;
  const text = (value: number) => formatFor(value, purpose, system);
  const asked = (value: number, acting: Acting | null) => (
    <Why question={() => acting && { kind: 'reaction', support, component, acting }}>{text(value)}</Why>
  );
  const governed = (governing: NonNullable<typeof most>) =>
    asked(governing.value, governingActing(evaluation, governing.by));
  return (
    <tr>
      <th scope="row">{name}</th>
      {groups.map(({ group, value, range }) => (
        <td key={group} className="figure">
          {asked(value, actingGroup(group))}
          {range && (
            <Under>
              {text(range.min)} to {text(range.max)}
            </Under>
          )}
        </td>
      ))}
      <td className="figure">{asked(total, { kind: 'all' })}</td>
      <td className="figure">
        {most === null ? '–' : governed(most)}
        {most && <Under>{most.of}</Under>}
      </td>
      <td className="figure">
        {least === null ? '–' : governed(least)}
        {purpose === 'reaction' && (least?.value ?? total) < -1e-6 && (
          <b className="ml-6 font-semibold text-ochre-ink">uplift</b>
        )}
        {least && <Under>{least.of}</Under>}
      </td>
    </tr>
  );
}

/** The most and the least of a group that acts only where adverse. */
interface GroupRange {
  readonly max: number;
  readonly min: number;
}

function reactionRows({ beam, groups, groupReactions, total, strength, nameOf }: MemberEvaluation) {
  const letters = new Map(letteredSupports(beam).map(({ index, letter }) => [index, letter]));
  return beam.supports.flatMap((support, index) => {
    const row = (component: 'vertical' | 'moment', words: string) => {
      const all = strength.flatMap(({ reactions }) => reactions[index] ?? []);
      const most = all.map(({ max }) => max[component]);
      const least = all.map(({ min }) => min[component]);
      const rangeOf = (group: string): GroupRange | null => {
        const own = groupReactions[index]?.[group]?.[component];
        return typeof own === 'object' ? own : null;
      };
      return {
        support: index,
        component,
        name: `${letters.get(index) ?? ''}, ${words}`,
        purpose: component === 'vertical' ? ('reaction' as const) : ('moment' as const),
        groups: groups.map(({ group, solution }) => ({
          group,
          value: solution.reactions[index]?.[component] ?? 0,
          range: rangeOf(group),
        })),
        total: total.reactions[index]?.[component] ?? 0,
        most:
          most.length > 0
            ? named(
                most.reduce((a, b) => (b.value > a.value ? b : a)),
                nameOf,
              )
            : null,
        least:
          least.length > 0
            ? named(
                least.reduce((a, b) => (b.value < a.value ? b : a)),
                nameOf,
              )
            : null,
      };
    };
    return [
      ...(support.vertical.kind === 'free' ? [] : [row('vertical', 'force, up')]),
      ...(support.rotation.kind === 'free' ? [] : [row('moment', 'moment, anticlockwise')]),
    ];
  });
}

const named = (governing: Governing, nameOf: ArrangementNamer) => ({
  value: governing.value,
  by: governing,
  of: nameOf(governing),
});
