import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, test } from 'vitest';
import { solveBeam } from '@/engine/beam';
import type { Written } from '@/features/review/draft';
import type { Fault } from '@/lib/app-error';
import { applyEdits, type EditorState, type StatedValues } from '../edit';
import { startDocument } from '../start';
import { addAt, addOver } from './add';
import { beamOf } from './beam-reading';
import { atEnds } from './box-values';
import { DraftDrawing } from './DraftDrawing';
import { drawnOf } from './parts';
import { placesOf } from './places';
import { drawableTemplate, type Sketch, sketchOf } from './sketch';
import { gripsOf, layStage } from './stage-layout';
import { beginSearch, searchFurther } from './worst';

const nothing = () => undefined;
const editorOf = (document: Written, more: Partial<EditorState> = {}): EditorState => ({
  document,
  faults: [],
  selected: null,
  values: {},
  readOnly: false,
  canUndo: false,
  canRedo: false,
  select: nothing,
  edit: nothing,
  undo: nothing,
  redo: nothing,
  setValues: nothing,
  ...more,
});
const draw = (document: Written, more: Partial<EditorState> = {}): string =>
  renderToStaticMarkup(<DraftDrawing editor={editorOf(document, more)} />).replaceAll(
    /[\u00a0\u2009\u202f]/g,
    ' ',
  );
const count = (drawn: string, part: string): number => drawn.split(part).length - 1;

const beam = startDocument('Two spans with an overhang', 'two-spans-overhang');
const sketched = (document: Written, values: StatedValues = {}): Sketch => {
  const sketch = sketchOf(document, values);
  if (!sketch) throw new Error('it can be drawn');
  return sketch;
};

describe('the drawing of a draft', () => {
  test('has every part as a choice with a name', () => {
    const drawn = draw(beam);
    for (const name of [
      'Support A, pin, at 0, 0 m',
      'Support B, roller, at L1, 6 m',
      'Dimension a, 1.5 m, from L1 + L2 to L1 + L2 + a',
      'Line load w, group G, from 0 to L1 + L2 + a',
    ])
      expect(drawn).toContain(`aria-label="${name}"`);
    expect(count(drawn, 'role="option"')).toBe(7);
    expect(count(drawn, 'role="option" aria-selected="true"')).toBe(0);
  });

  test('marks the part that the form has chosen, by whichever of its fields', () => {
    const drawn = draw(beam, { selected: '/beam/supports/1/at' });
    expect(drawn).toContain('aria-selected="true" aria-label="Support B, roller, at L1, 6 m"');
    expect(count(drawn, 'class="selection"')).toBe(1);
    expect(drawn).toContain('Pin with a rotational spring');
  });

  test('of nothing says how to begin, and has no tool but the span', () => {
    const drawn = draw({});
    expect(drawn).toContain('Nothing is drawn yet.');
    expect(count(drawn, 'role="option"')).toBe(0);
    expect(count(drawn, 'aria-disabled="true"')).toBe(14);
  });

  test('that nobody may change has no tools', () => {
    expect(draw(beam, { readOnly: true })).not.toContain('role="toolbar"');
  });

  test('says what is missing while nothing holds the beam, and draws how it moves', () => {
    const { document } = applyEdits(beam, [
      { do: 'remove', at: '/beam/supports/2' },
      { do: 'remove', at: '/beam/supports/1' },
    ]);
    const drawn = draw(document);
    expect(drawn).toContain('It turns about the pin at 0.000 m.');
    expect(drawn).toContain('class="error-line heavy"');
    expect(drawn).not.toContain('Moment and reactions');
  });

  test('gives the reactions and moments of the draft at the values that are shown', () => {
    // Three-moment equation, two spans l, overhang a, w on all: M_C = −wa²/2, 4 M_B l + M_C l = −w l³/2.
    const [l, a, w] = [4, 2, 5];
    const mc = (-w * a ** 2) / 2;
    const mb = (-w * l ** 2) / 8 - mc / 4;
    const drawn = draw(beam, { values: { L1: '4 m', L2: '4 m', a: '2 m', w: '5 kN/m' } });
    expect(drawn).toContain(`>−${Math.abs(Math.min(mb, mc)).toFixed(1)} kNm<`);
    expect(drawn).toContain(`<dd>${((w * l) / 2 + mb / l).toFixed(1)} kN</dd>`);
  });

  test('shows how the beam would move where the redundants that are written leave a mechanism', () => {
    const { document } = applyEdits(beam, [
      { do: 'set', at: '/beam/redundants', value: [{ at: 'L1 + L2', component: 'moment' }] },
    ]);
    expect(draw(document)).toMatch(/role="alert".*turns about the roller/s);
  });
});

describe('a draft with faults', () => {
  const broken = applyEdits(beam, [{ do: 'set', at: '/beam/supports/1/at', value: 'L9' }]).document;
  const faults: Fault[] = [{ pointer: '/beam/supports/1/at', code: 'unknown_symbol', message: 'No L9.' }];

  test('that was never drawn asks for a beam', () => {
    expect(draw(broken, { faults })).toContain('Nothing is drawn yet.');
  });

  test('of its texts alone is drawn all the same', () => {
    const unnamed = applyEdits(beam, [
      { do: 'set', at: '/parameters/0/name', value: '' },
      { do: 'set', at: '/summary', value: '' },
      { do: 'set', at: '/rules', value: [{ id: 'half' }] },
    ]).document;
    expect(count(draw(unnamed), 'role="option"')).toBe(7);
  });
});

describe('where parts are taken hold of', () => {
  test('every grip lies on the sheet, and those of loads over those of supports', () => {
    let document = beam;
    const place = (text: string) => {
      const found = placesOf(sketched(document)).find((one) => one.text === text);
      if (!found) throw new Error(`${text} is a place`);
      return found;
    };
    for (const tool of ['point', 'couple', 'hinge'] as const)
      document = applyEdits(
        document,
        addAt(document, sketched(document), tool, place('L1/2')).edits,
      ).document;
    for (const tool of ['triangle', 'curvature', 'segment'] as const)
      document = applyEdits(
        document,
        addOver(document, sketched(document), tool, { from: place('L1'), to: place('L1 + L2') }).edits,
      ).document;
    const drawn = drawnOf(sketched(document));
    for (const width of [320, 1000]) {
      const layout = layStage(drawn.beam, width);
      const grips = gripsOf(drawn.beam, drawn.parts, layout);
      expect(grips).toHaveLength(15);
      for (const { x, y, width: wide, height } of grips) {
        expect(x).toBeGreaterThanOrEqual(0);
        expect(y).toBeGreaterThanOrEqual(0);
        expect(x + wide).toBeLessThanOrEqual(width);
        expect(y + height).toBeLessThanOrEqual(layout.height);
        expect(Math.min(wide, height)).toBeGreaterThanOrEqual(8);
      }
    }
  });
});

describe('the worst of the box', () => {
  const template = drawableTemplate(beam);
  if (!template) throw new Error('it can be drawn');

  test('is looked for among corners and points between, a few at a time', () => {
    let search = beginSearch(template);
    let looks = 0;
    while (search.done < search.total) {
      search = searchFurther(template, search, 40);
      looks++;
    }
    expect(looks).toBe(Math.ceil(search.total / 40));
    expect(search.worst?.share).toBeLessThan(1);
    expect(beamOf(sketched(beam, search.worst?.values))).toHaveProperty('beam');
  });

  test('is a point without a result, where there is one', () => {
    // A place of its own that no rule keeps on the beam runs off it at its largest.
    const loose = applyEdits(beam, [
      {
        do: 'insert',
        at: '/parameters/-',
        value: { ...template.parameters[2], symbol: 'c', tex: 'c', default: '1 m' },
      },
      { do: 'insert', at: '/beam/hinges/-', value: { at: 'c' } },
    ]).document;
    const drawn = drawableTemplate(loose);
    const search = drawn && searchFurther(drawn, beginSearch(drawn), 200);
    expect(search?.worst?.share).toBe(Number.POSITIVE_INFINITY);
    expect(search?.worst?.message).toBeTruthy();
  });

  test('ends of ranges leave the loads as they are', () => {
    expect(atEnds(template, 'min')).toEqual({ L1: '0.3 m', L2: '0.3 m', a: '0 m' });
    expect(atEnds(template, 'max')).toEqual({ L1: '30 m', L2: '30 m', a: '15 m' });
  });
});

test('the solver that the preview asks is the page’s: reactions carry the load', () => {
  const reading = beamOf(sketched(beam));
  if (!('beam' in reading)) throw new Error('it stands');
  const sum = solveBeam(reading.beam).reactions.reduce((total, { vertical }) => total + vertical, 0);
  expect(sum).toBeCloseTo(5000 * 13.5, 6);
});
