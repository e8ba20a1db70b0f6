import { unitText } from '@/engine/quantity';
import { MEASURED_SHAPES } from '@/engine/section';
import { cellText } from './cells';
import type { Axes, DecimalMark, Encoding, Mapping, Question } from './contract';
import { samplesOf } from './encoding';
import { FIELD_WORDS, isNumberField } from './headings';
import { hasRightUnit, offeredUnits, openQuestions } from './mapping';
import type { MarkReading } from './marks';
import type { FileLine } from './stream';
import { AXES_WORDS } from './synonyms';

type Known = {
  head: Uint8Array;
  choices: readonly Encoding[];
  marks: MarkReading;
  rows: readonly FileLine[];
};

function encodingQuestion({ head, choices }: Known): Question {
  const message = 'The encoding of the file is not marked. Choose the one in which these cells read right.';
  return {
    kind: 'encoding',
    message,
    choices: choices.map((value) => ({ value, samples: samplesOf(head, value) })),
  };
}

function markQuestion({ marks }: Known): Question {
  const samples = [...new Set([...marks.points, ...marks.commas])].slice(0, 3);
  const words = (mark: DecimalMark) => samples.map((sample) => `${sample} is ${asRead(sample, mark)}`);
  const choice = (value: DecimalMark) => ({ value, samples: words(value) });
  const message = `Decimals may be written with a point or a comma: ${samples.join(', ')}. Say which.`;
  return { kind: 'decimal_mark', message, samples, choices: [choice('.'), choice(',')] };
}

const asRead = (sample: string, mark: DecimalMark) =>
  sample.replaceAll(mark === '.' ? ',' : '.', '').replace(mark, '.');

function axesQuestion({ columns }: Mapping): Question {
  const headings = columns
    .filter(({ field, byAxes }) => field === null && byAxes)
    .map(({ heading }) => heading);
  const message = `${headings.join(', ')}: these letters mean opposite axes by region. Say which convention the file follows.`;
  const choices = (Object.keys(AXES_WORDS) as Axes[]).map((value) => ({ value, meaning: AXES_WORDS[value] }));
  return { kind: 'axes', message, headings, choices };
}

function unitQuestions({ columns }: Mapping, rows: readonly FileLine[]): Question[] {
  return columns.flatMap((column) => {
    const { field, heading, unit, index } = column;
    if (!isNumberField(field) || hasRightUnit(column)) return [];
    const first = cellText(rows[0]?.cells[index] ?? '');
    const choices = offeredUnits(field).map((value) => ({ value, sample: `${first} ${unitText(value)}` }));
    const message =
      unit === null
        ? `"${heading}" has no unit. Say which it is in.`
        : `"${unit}" is no unit of ${FIELD_WORDS[field]}. Say which "${heading}" is in.`;
    return [{ kind: 'unit', message, column: index, heading, choices }];
  });
}

/** What a person has to say, with what helps to say it. */
export function questionsOf(mapping: Mapping, known: Known): Question[] {
  const has = (name: string) => mapping.columns.some(({ field }) => field === name);
  const asked: Readonly<Record<Question['kind'], () => Question[]>> = {
    encoding: () => [encodingQuestion(known)],
    decimal_mark: () => [markQuestion(known)],
    axes: () => [axesQuestion(mapping)],
    unit: () => unitQuestions(mapping, known.rows),
    column: () =>
      (['designation', 'h'] as const)
        .filter((field) => !has(field))
        .map((field) => ({
          kind: 'column',
          field,
          message: `No column is headed as ${FIELD_WORDS[field]}. Say which it is.`,
        })),
    shape: () => {
      const message = 'Neither headings nor names tell the shape. Say which it is.';
      return [{ kind: 'shape', message, choices: MEASURED_SHAPES.map((value) => ({ value })) }];
    },
  };
  return openQuestions(mapping).flatMap((kind) => asked[kind]());
}
