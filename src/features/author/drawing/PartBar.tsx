import { Button } from '@/components/ui/Button';
import { ChoiceField } from '@/components/ui/Field';
import { type EditorState, textAt, valueAt } from '../edit';
import {
  choiceOf,
  movedTo,
  type PlaceKey,
  SUPPORT_CHOICES,
  type SupportChoice,
  settlementEdits,
  supportEdits,
  whyKept,
} from './change';
import type { Part } from './parts';
import { placesOf } from './places';
import type { Sketch } from './sketch';

interface PartBarProps {
  readonly editor: EditorState;
  readonly sketch: Sketch;
  readonly part: Part;
  readonly onRemove: () => void;
}

const SUPPORT_WORDS: Readonly<Record<SupportChoice, string>> = {
  fixed: 'Fixed',
  pin: 'Pin',
  roller: 'Roller',
  guided: 'Guided',
  free: 'Free',
  spring: 'On a spring',
  turning: 'Pin with a rotational spring',
};

/** The chosen part: how it holds, where it stands, and taking it away. */
export function PartBar({ editor, sketch, part, onRemove }: PartBarProps) {
  const { pointer, name } = part;
  return (
    <section
      className="flex flex-wrap items-end gap-x-14 gap-y-8 border-t border-rule pt-8"
      aria-label="Chosen part"
    >
      <p className="w-full font-semibold" aria-live="polite">
        {name}
      </p>
      {!editor.readOnly && <Changes editor={editor} sketch={sketch} part={part} onRemove={onRemove} />}
      <Button size="small" onClick={() => showInForm(pointer)}>
        Show in the form
      </Button>
    </section>
  );
}

/** A dimension is changed by its length, which has a field of its own. */
function Changes({ editor, sketch, part, onRemove }: PartBarProps) {
  const { document } = editor;
  const { pointer, kind } = part;
  if (kind === 'dimension') return null;
  const why = whyKept(document, pointer);
  const settles = textAt(document, `${pointer}/rise`) !== '';
  return (
    <>
      {kind === 'support' && <KindField editor={editor} pointer={pointer} />}
      {KEYS.filter((key) => valueAt(document, `${pointer}/${key}`) !== undefined).map((key) => (
        <PlaceField key={key} editor={editor} sketch={sketch} pointer={pointer} of={key} />
      ))}
      {kind === 'support' && (
        <Button size="small" onClick={() => editor.edit(...settlementEdits(document, pointer))}>
          {settles ? 'Let it not settle' : 'Let it settle'}
        </Button>
      )}
      <Button size="small" keyName={why === undefined ? 'Del' : undefined} reason={why} onClick={onRemove}>
        Remove
      </Button>
    </>
  );
}

/** Its row of the form, which is open: that is where its other fields are. */
function showInForm(pointer: string): void {
  const row = window.document.querySelector<HTMLElement>(`li[data-part="${CSS.escape(pointer)}"] > button`);
  row?.scrollIntoView({ block: 'start' });
  row?.focus({ preventScroll: true });
}

const KEYS = ['at', 'from', 'to'] as const;
const KEY_WORDS: Readonly<Record<PlaceKey, string>> = { at: 'Place', from: 'From', to: 'To' };

interface FieldProps {
  readonly editor: EditorState;
  readonly pointer: string;
}

function KindField({ editor, pointer }: FieldProps) {
  const { document } = editor;
  return (
    <div className="w-180">
      <ChoiceField
        label="Kind"
        choices={SUPPORT_CHOICES.map((value) => ({ value, label: SUPPORT_WORDS[value] }))}
        value={choiceOf(valueAt(document, pointer))}
        onChange={({ target }) => {
          const choice = SUPPORT_CHOICES.find((one) => one === target.value);
          if (choice) editor.edit(...supportEdits(document, pointer, choice));
        }}
      />
    </div>
  );
}

/** The places that there are expressions for; what the author wrote is among them. */
function PlaceField({
  editor,
  sketch,
  pointer,
  of,
}: FieldProps & { readonly sketch: Sketch; readonly of: PlaceKey }) {
  const { document } = editor;
  const written = textAt(document, `${pointer}/${of}`);
  const places = placesOf(sketch);
  const texts = [
    ...new Set([
      ...(places.some(({ text }) => text === written) ? [] : [written]),
      ...places.map(({ text }) => text),
    ]),
  ];
  return (
    <div className="w-180">
      <ChoiceField
        label={KEY_WORDS[of]}
        choices={texts.map((value) => ({ value, label: value }))}
        value={written}
        onChange={({ target }) => {
          const place = places.find(({ text }) => text === target.value);
          if (place) editor.edit(...movedTo(document, sketch, pointer, of, place));
        }}
      />
    </div>
  );
}
