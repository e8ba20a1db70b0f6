import { useRef, useState } from 'react';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import type { Answer } from '@/features/section/import/contract';
import type { Deeds } from './FindingItem';
import { FindingList } from './FindingList';
import type { Against, ImportView } from './imports';
import { ProgressZone } from './ProgressZone';
import { usePlace } from './place';
import { QuestionList } from './QuestionList';
import { firstRowLine, lostWords } from './report';
import { countWords } from './words';

interface FindingZoneProps extends Omit<Deeds, 'isOff' | 'firstRow'> {
  readonly view: ImportView;
  readonly mapping: ImportView['mapping'];
  readonly underWay: boolean;
  readonly isLost: boolean;
  readonly isEditable: boolean;
  readonly onAnswer: (answer: Answer) => void;
  readonly onCancel: () => void;
}

/** First what only a person can say, then how far the check is, then what it found. */
export function FindingZone(props: FindingZoneProps) {
  const { view, underWay } = props;
  if (view.state === 'mapping' || view.state === 'failed')
    return (
      <section className="zone">
        <ZoneHeading letter="B">What the file does not say</ZoneHeading>
        <Asked {...props} />
      </section>
    );
  if (underWay || view.report) return <CheckZone {...props} />;
  return (
    <section className="zone">
      <ZoneHeading letter="B">Rows with problems</ZoneHeading>
      <p>
        The import was cancelled before its rows were checked. The file is kept, and nothing became of it.
      </p>
    </section>
  );
}

function CheckZone(props: FindingZoneProps) {
  const { view, underWay, isLost, isEditable, onFix, onAccept, onCancel } = props;
  const place = usePlace();
  const host = useRef<HTMLElement>(null);
  /** The zone stays as long while its rows are checked again, so that nothing below it jumps. */
  const [height, setHeight] = useState(0);
  const keeping =
    <T,>(act: (given: T) => void) =>
    (given: T) => {
      place.keep();
      setHeight(host.current?.offsetHeight ?? 0);
      act(given);
    };
  return (
    <section ref={host} className="zone" style={underWay ? { minHeight: height } : undefined}>
      <ZoneHeading letter="B" note={underWay ? undefined : <Counts view={view} />}>
        Rows with problems
      </ZoneHeading>
      {underWay ? (
        <ProgressZone
          view={view}
          isLost={isLost}
          onCancel={view.may_act && lostWords(view) === '' ? onCancel : undefined}
        />
      ) : (
        <FindingList
          view={view}
          firstRow={firstRowLine(view.mapping)}
          isOff={!isEditable || view.state !== 'findings'}
          place={place}
          onFix={keeping(onFix)}
          onAccept={keeping(onAccept)}
        />
      )}
      {!underWay && view.report?.against && <Beside against={view.report.against} />}
      {isEditable && <SaidBefore {...props} />}
    </section>
  );
}

/** How far the rows are those of the issued edition. */
function Beside({ against: { matched, changed } }: { against: Against }) {
  const words =
    matched === 0
      ? 'None of these rows stands in the issued edition.'
      : `${countWords(matched)} of these rows ${matched === 1 ? 'stands' : 'stand'} in the issued edition too, ${countWords(changed)} with other values. The draft shows them side by side.`;
  return <p className="mt-10 text-ink-2">{words}</p>;
}

/** What was asked of the file before it was checked, to be said otherwise. */
function SaidBefore({ view: { recognised }, mapping, onAnswer }: FindingZoneProps) {
  const questions = recognised.questions.filter(({ kind }) => kind !== 'unit');
  if (questions.length === 0) return null;
  return (
    <details className="mt-14">
      <summary className="link flex min-h-26 items-center max-md:min-h-44">What you said of the file</summary>
      <div className="mt-8">
        <QuestionList {...{ questions, mapping, onAnswer }} isFixed={false} />
      </div>
    </details>
  );
}

const counted = (count: number, one: string): string =>
  `${countWords(count)} ${one}${count === 1 ? '' : 's'}`;

function Counts({ view: { report } }: { view: ImportView }) {
  if (!report) return null;
  return (
    <>
      <b className={report.errors > 0 ? 'font-semibold text-error' : 'font-normal'}>
        {counted(report.errors, 'error')}
      </b>
      ,{' '}
      <b className={report.warnings > 0 ? 'font-semibold text-ochre-ink' : 'font-normal'}>
        {counted(report.warnings, 'warning')}
      </b>
    </>
  );
}

function Asked({ view: { recognised }, mapping, isEditable, onAnswer }: FindingZoneProps) {
  const { questions } = recognised;
  return (
    <div className="grid gap-14">
      {questions.length === 0 && (
        <p>Everything that the check needs stands in the file. Look at the columns, then have it checked.</p>
      )}
      {questions.some(({ kind }) => kind === 'unit') && (
        <p>Some columns have no unit in their heading. Say it in zone A.</p>
      )}
      <QuestionList {...{ questions, mapping, onAnswer }} isFixed={!isEditable} />
      <p className="text-ink-2">
        Nothing becomes an edition yet: the check is a dry run over every row, and its report is kept.
      </p>
    </div>
  );
}
