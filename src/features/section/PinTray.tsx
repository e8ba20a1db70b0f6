import { OutlineRow } from '@/components/drawing/OutlineRow';
import { DRAWING_FORMATS } from '@/components/drawing/quantity-format';
import { Button } from '@/components/ui/Button';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import type { UnitSystemName } from '@/engine/quantity';
import { paths } from '@/paths';
import { AddressLink } from './AddressLink';
import type { NamedAction } from './actions';
import { writeAddress } from './address';
import type { EditionView } from './edition';
import { outlineOf } from './outline';
import type { SectionItem } from './section';

interface PinTrayProps {
  readonly pinned: readonly SectionItem[];
  /** Drawn where nothing is pinned. */
  readonly chosen: SectionItem | null;
  readonly editions: readonly EditionView[];
  readonly system: UnitSystemName;
  readonly onUnpinAll: () => void;
  readonly actions: readonly NamedAction[];
  readonly onAction: (action: NamedAction) => void;
}

/** The pinned sections on one ground line, at one scale; the chosen one while none is pinned. */
export function PinTray(props: PinTrayProps) {
  const { pinned, chosen, editions, system, onUnpinAll, actions, onAction } = props;
  const axes = new Map(editions.map((edition) => [edition.table, edition.axes]));
  const isPinned = pinned.length > 0;
  const drawn = isPinned || chosen === null ? pinned : [chosen];
  return (
    <section className="zone">
      <ZoneHeading
        letter="A"
        note={
          isPinned && (
            <Button tone="text" onClick={onUnpinAll}>
              Unpin all
            </Button>
          )
        }
      >
        {isPinned ? 'Pinned, drawn to one scale' : 'Chosen, drawn to scale'}
      </ZoneHeading>
      {drawn.length > 0 && (
        <OutlineRow
          sections={drawn.map((item) => outlineOf(item, axes.get(item.table), system))}
          format={DRAWING_FORMATS[system]}
          isNumbered={isPinned}
        />
      )}
      {!isPinned && (
        <p className="mt-10 text-ink-2">
          Pin up to four sections, with the ring in their row or the key P, and they are drawn here side by
          side.
        </p>
      )}
      {actions.length > 0 && (
        <ul aria-label="From the chosen section" className="mt-10 text-schedule">
          {actions.map((action) => (
            <li key={action.key}>
              <AddressLink
                href={paths.sections + writeAddress(action.state)}
                onFollow={() => onAction(action)}
              >
                {action.words}
                <kbd className="ml-9">{action.key}</kbd>
              </AddressLink>
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}
