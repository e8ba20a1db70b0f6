import { Button } from '@/components/ui/Button';
import type { EditorState } from '../edit';

interface NotDrawnProps {
  readonly editor: EditorState;
  /** Nothing could be drawn yet. */
  readonly isEmpty: boolean;
}

/** Why the drawing stands still, and a way to the first fault. */
export function NotDrawn({ editor: { faults, select }, isEmpty }: NotDrawnProps) {
  const own = faults.filter(({ pointer }) => /^\/(parameters|derived|beam)/.test(pointer));
  const [first] = own;
  const keeping = own.length > 1 ? `${own.length} faults keep` : 'A fault keeps';
  const words = isEmpty
    ? 'Nothing is drawn yet. Add a span: the beam starts there, with its length as a parameter.'
    : `${keeping} the draft from being drawn. The last good drawing stands.`;
  return (
    <div
      className="hatch-edge flex flex-wrap items-center gap-x-14 gap-y-6 bg-ochre-wash px-10 py-6"
      role="status"
    >
      <span>{words}</span>
      {first && (
        <Button size="small" onClick={() => select(first.pointer)}>
          Go to the first
        </Button>
      )}
    </div>
  );
}
