import { type ComponentType, type ReactNode, useCallback, useRef, useState } from 'react';
import { flushSync } from 'react-dom';
import type { Key } from '@/engine/why';
import type { About } from './subject';
import type { WhyPanelProps } from './WhyPanel';
import { type Ask, WhyContext } from './why-context';

interface WhyScopeProps {
  /** What the page shows when a number is asked about; null where it shows no results. */
  readonly about: () => About | null;
  /** Takes the person to a parameter's field. */
  readonly onField: (symbol: string) => void;
  readonly children: ReactNode;
}

interface Asked {
  readonly about: About;
  readonly key: Key;
  readonly pressed: Element;
}

/** The numbers of a page can be asked where they come from; what answers is fetched with the first question. */
export function WhyScope({ about, onField, children }: WhyScopeProps) {
  const [asked, setAsked] = useState<Asked | null>(null);
  const [Panel, setPanel] = useState<ComponentType<WhyPanelProps> | null>(null);
  const [isMissing, setMissing] = useState(false);
  const latest = useRef(about);
  latest.current = about;
  const ask: Ask = useCallback((question, pressed) => {
    const [key, shown] = [question(), latest.current()];
    if (!key || !shown) return;
    setMissing(false);
    setAsked({ about: shown, key, pressed });
    import('./WhyPanel').then(
      ({ WhyPanel }) => setPanel(() => WhyPanel),
      () => setMissing(true),
    );
  }, []);
  const close = (symbol?: string) => {
    // While the panel stands nothing behind it takes the focus.
    flushSync(() => setAsked(null));
    const pressed = asked?.pressed;
    if (symbol !== undefined) onField(symbol);
    else if (pressed instanceof HTMLElement || pressed instanceof SVGElement) pressed.focus();
  };
  return (
    <WhyContext value={ask}>
      {children}
      {asked && Panel && <Panel about={asked.about} question={asked.key} onClose={close} />}
      {asked && isMissing && (
        <p role="alert" className="fixed inset-x-0 bottom-0 z-20 border-t-2 border-ink bg-error-wash p-14">
          What answers could not be fetched. Ask again when the connection is back.
        </p>
      )}
    </WhyContext>
  );
}
