export interface RevisionRow {
  revision: string;
  date: string;
  by: string;
  checked?: string | undefined;
  change: string;
}

/** Builds up from the title block's top edge, newest first. */
export function RevisionList({ rows, label }: { rows: readonly RevisionRow[]; label: string }) {
  return (
    <div className="col-span-6 p-0">
      <table className="w-full border-collapse text-left text-schedule leading-17">
        <thead>
          <tr className="caps">
            <th scope="col" className="w-44 py-5 pl-10">
              {label}
            </th>
            <th scope="col">Date</th>
            <th scope="col">By</th>
            <th scope="col">Chk</th>
            <th scope="col">Change</th>
          </tr>
        </thead>
        <tbody className="[&_td]:border-t [&_td]:border-rule [&_td]:py-5 [&_td]:pr-8 [&_td]:align-top">
          {rows.map((row, index) => (
            <tr key={row.revision} className={index === 0 ? '[&>td]:border-ink!' : ''}>
              <td className={`pl-10 ${index === 0 ? 'font-semibold' : ''}`}>{row.revision}</td>
              <td className="whitespace-nowrap">{row.date}</td>
              <td className="italic">{row.by}</td>
              <td className="italic">{row.checked ?? '–'}</td>
              <td>{row.change}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
