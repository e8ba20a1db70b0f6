import { ZoneHeading } from '@/components/ui/ZoneHeading';
import type { HistoryLine } from './workspace';

const moment = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  hour: '2-digit',
  minute: '2-digit',
  timeZone: 'UTC',
});

/** What was done to the member, out of the record of events. */
export function HistoryZone({ history }: { readonly history: readonly HistoryLine[] }) {
  return (
    <section className="zone">
      <ZoneHeading letter="H" note="times in UTC">
        Record
      </ZoneHeading>
      <ol className="border-t-2 border-ink text-schedule">
        {history.map(({ at, by, version, change }) => (
          <li key={`${at} ${version}`} className="border-b border-rule py-6">
            <span className="flex justify-between gap-10">
              <b className="font-semibold">
                {version}. <i className="font-normal">{by}</i>
              </b>
              <time dateTime={at} className="whitespace-nowrap text-ink-2">
                {moment.format(new Date(at))}
              </time>
            </span>
            <span className="block break-words text-ink-2">{change}</span>
          </li>
        ))}
      </ol>
    </section>
  );
}
