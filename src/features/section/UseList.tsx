import { paths } from '@/paths';

interface UseListProps {
  readonly uses: readonly {
    readonly job: string;
    readonly jobName: string;
    readonly mark: string;
    readonly title: string;
    readonly edition: number;
  }[];
}

/** The members made of a section, in the jobs that the reader may see. */
export function UseList({ uses }: UseListProps) {
  if (uses.length === 0)
    return <p className="text-ink-2">No member of a job that you may see is made of this section.</p>;
  return (
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
        {uses.map(({ job, jobName, mark, title, edition }) => (
          <tr key={`${job} ${mark}`}>
            <td>
              <a href={paths.job(job)}>{job}</a> <span className="text-ink-2">{jobName}</span>
            </td>
            <td>
              <a href={paths.member(job, mark)}>{mark}</a> <span className="text-ink-2">{title}</span>
            </td>
            <td className="figure">{edition}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
