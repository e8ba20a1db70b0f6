import type { RevisionState } from '@/features/review/review';
import { paths } from '@/paths';
import type { SectionUses } from './page';

interface UseListProps {
  readonly uses: SectionUses;
  /** Where the next page of them is; null on the last. */
  readonly onward: string | null;
}

const AGED: Readonly<Partial<Record<RevisionState, string>>> = {
  superseded: 'superseded',
  withdrawn: 'withdrawn',
};

/** The members made of a section, in the jobs that the reader may see. */
export function UseList({ uses: { items, total }, onward }: UseListProps) {
  if (items.length === 0)
    return (
      <p className="text-ink-2">
        {total === 0
          ? 'No member of a job that you may see is made of this section.'
          : `The list ends before this page: ${total} in all.`}
      </p>
    );
  return (
    <>
      <table className="schedule">
        <thead>
          <tr>
            <th scope="col">Job</th>
            <th scope="col">Member</th>
            <th scope="col" className="figure">
              Edition
            </th>
          </tr>
        </thead>
        <tbody>
          {items.map(({ job, jobName, mark, title, edition, state }) => (
            <tr key={`${job} ${mark}`}>
              <td>
                <a href={paths.job(job)}>{job}</a> <span className="text-ink-2">{jobName}</span>
              </td>
              <td>
                <a href={paths.member(job, mark)}>{mark}</a> <span className="text-ink-2">{title}</span>
              </td>
              <td className="figure">
                {edition}
                {AGED[state] && <span className="block text-note text-ochre-ink">{AGED[state]}</span>}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {onward !== null && (
        <p className="mt-8">
          <a className="link" href={onward}>
            Further members
          </a>
          , {total} in all
        </p>
      )}
    </>
  );
}
