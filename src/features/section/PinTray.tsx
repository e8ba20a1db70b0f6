import { OutlineRow } from '@/components/drawing/OutlineRow';
import { DRAWING_FORMATS } from '@/components/drawing/quantity-format';
import { Button } from '@/components/ui/Button';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import type { UnitSystemName } from '@/engine/quantity';
import type { EditionView } from './edition';
import { outlineOf } from './outline';
import type { SectionItem } from './section';

interface PinTrayProps {
  readonly pinned: readonly SectionItem[];
  readonly editions: readonly EditionView[];
  readonly system: UnitSystemName;
  readonly onUnpinAll: () => void;
}

/** The pinned sections on one ground line, at one scale. */
export function PinTray({ pinned, editions, system, onUnpinAll }: PinTrayProps) {
  const axes = new Map(editions.map((edition) => [edition.table, edition.axes]));
  return (
    <section className="zone">
      <ZoneHeading
        letter="A"
        note={
          pinned.length > 0 && (
            <Button tone="text" onClick={onUnpinAll}>
              Unpin all
            </Button>
          )
        }
      >
        Pinned, drawn to one scale
      </ZoneHeading>
      {pinned.length === 0 ? (
        <p className="text-ink-2">
          Nothing is pinned. Pin up to four sections with the ring in their row, or with the key P, and they
          are drawn here side by side.
        </p>
      ) : (
        <OutlineRow
          sections={pinned.map((item) => outlineOf(item, axes.get(item.table), system))}
          format={DRAWING_FORMATS[system]}
        />
      )}
    </section>
  );
}
