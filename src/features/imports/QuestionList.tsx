import { useId } from 'react';
import { Radio } from '@/components/ui/Choice';
import type { Answer, Mapping, Question } from '@/features/section/import/contract';
import { FIELDS } from './fields';
import { AXES_NAMES, ENCODING_WORDS } from './words';

const SHAPE_WORDS: Readonly<Record<string, string>> = {
  i: 'I and H sections',
  channel: 'Channels',
  rhs: 'Rectangular hollow',
  shs: 'Square hollow',
  chs: 'Round hollow',
  rectangle: 'Solid rectangles',
  round: 'Solid rounds',
};

interface QuestionListProps {
  readonly questions: readonly Question[];
  readonly mapping: Mapping;
  readonly isFixed: boolean;
  readonly onAnswer: (answer: Answer) => void;
}

/** What only a person can say of a file. Nothing is taken by itself. */
export function QuestionList({ questions, mapping, isFixed, onAnswer }: QuestionListProps) {
  // A unit is asked for in the column's own row.
  const asked = questions.filter(({ kind }) => kind !== 'unit');
  if (asked.length === 0) return null;
  return (
    <div className="grid gap-14">
      {asked.map((question) => (
        <Asked key={JSON.stringify(question)} {...{ question, mapping, isFixed, onAnswer }} />
      ))}
    </div>
  );
}

type AskedProps = Omit<QuestionListProps, 'questions'> & { readonly question: Question };

interface Offer {
  readonly answer: Answer;
  readonly words: string;
  readonly note?: string | undefined;
  readonly isChosen: boolean;
}

function Asked({ question, mapping, isFixed, onAnswer }: AskedProps) {
  const name = useId();
  const offers = offersOf(question, mapping);
  if (offers.length === 0) return <p className="font-semibold text-error">{question.message}</p>;
  return (
    <fieldset className="min-w-0">
      <legend className="mb-6 font-semibold">{question.message}</legend>
      <div className="flex flex-col items-start">
        {offers.map(({ answer, words, note, isChosen }) => (
          <Radio
            key={words}
            name={name}
            checked={isChosen}
            disabled={isFixed}
            onChange={() => onAnswer(answer)}
          >
            {words}
            {note && <span className="block text-note text-ink-2">{note}</span>}
          </Radio>
        ))}
      </div>
    </fieldset>
  );
}

function offersOf(question: Question, mapping: Mapping): readonly Offer[] {
  switch (question.kind) {
    case 'encoding':
      return question.choices.map(({ value, samples }) => ({
        answer: { kind: 'encoding', value },
        words: ENCODING_WORDS[value] ?? value,
        note: samples.join(' · '),
        isChosen: mapping.encoding === value,
      }));
    case 'decimal_mark':
      return question.choices.map(({ value, samples }) => ({
        answer: { kind: 'decimal_mark', value },
        words: value === ',' ? 'A comma stands before decimals' : 'A point stands before decimals',
        note: samples.join(' · '),
        isChosen: mapping.decimalMark === value,
      }));
    case 'axes':
      return question.choices.map(({ value, meaning }) => ({
        answer: { kind: 'axes', value },
        words: AXES_NAMES[value],
        note: meaning,
        isChosen: mapping.axes === value,
      }));
    case 'shape':
      return question.choices.map(({ value }) => ({
        answer: { kind: 'shape', value },
        words: SHAPE_WORDS[value] ?? value,
        isChosen: mapping.shape === value,
      }));
    default:
      return [];
  }
}

/** What is still not said, for the reason beside the button. */
export function openWords(kinds: readonly Question['kind'][], mapping: Mapping): string | null {
  const [kind] = kinds;
  if (kind === undefined) return null;
  switch (kind) {
    case 'unit': {
      const open = mapping.columns.filter(
        ({ field, unit }) => field !== null && FIELDS[field].quantity !== null && unit === null,
      );
      return `Say the unit of ${open.map(({ heading }) => heading).join(', ')}.`;
    }
    case 'encoding':
      return 'Say in which encoding the file is.';
    case 'decimal_mark':
      return 'Say whether decimals have a point or a comma.';
    case 'axes':
      return 'Say which letters the axes have.';
    case 'shape':
      return 'Say which shape the sections have.';
    case 'column':
      return 'Say which column holds what a section needs.';
  }
}
