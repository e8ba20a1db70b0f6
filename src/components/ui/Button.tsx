import { type ComponentProps, useId } from 'react';

type ButtonTone = 'inverted' | 'outlined' | 'text';
type ButtonSize = 'small' | 'regular' | 'block';

interface Looks {
  tone?: ButtonTone;
  size?: ButtonSize;
  /** Key that does the same, shown beside the word. */
  keyName?: string | undefined;
}

const TONES: Record<ButtonTone, string> = {
  inverted: 'border-ink bg-ink text-paper hover:bg-ink-2',
  outlined: 'border-ink hover:bg-paper-3',
  text: 'underline decoration-1 decoration-rule-strong underline-offset-3 hover:decoration-ink',
};

const SIZES: Record<ButtonSize, string> = {
  small: 'min-h-28 border px-11 py-2 text-schedule',
  regular: 'min-h-34 border px-14 py-5',
  // The title block's own rules stand in for the border.
  block: 'w-full min-h-46 px-10 py-6 focus-visible:-outline-offset-4',
};

const OFF = 'border-dashed border-ink-2 text-ink-2 hatch-off cursor-not-allowed';

function buttonClass({ tone = 'outlined', size = 'regular' }: Looks, off = false) {
  const padding = tone === 'text' ? 'min-h-26' : SIZES[size];
  return [
    'inline-flex items-center justify-center gap-9 font-semibold leading-20 no-underline',
    'pointer-coarse:min-h-44 max-md:min-h-44',
    padding,
    off ? OFF : TONES[tone],
  ].join(' ');
}

type ButtonProps = Omit<ComponentProps<'button'>, 'disabled'> &
  Looks & {
    /** Turns the button into a link that looks the same. */
    href?: string | undefined;
    /** Why it cannot be used now; it stays focusable so that the reason can be read. */
    reason?: string | undefined;
    /** Id of an element elsewhere that gives the reason. */
    reasonId?: string | undefined;
  };

export function Button({ tone, size, keyName, href, reason, reasonId, children, ...rest }: ButtonProps) {
  const ownId = useId();
  const looks = { tone: tone ?? 'outlined', size: size ?? 'regular' } as const;
  const off = reason !== undefined || reasonId !== undefined;
  const words = (
    <>
      {children}
      {keyName && <kbd className="border-current text-inherit">{keyName}</kbd>}
    </>
  );
  if (off) {
    const button = (
      <button
        type="button"
        aria-disabled="true"
        aria-describedby={reasonId ?? ownId}
        className={buttonClass(looks, true)}
      >
        {children}
      </button>
    );
    if (reason === undefined) return button;
    return (
      <span className="inline-flex flex-wrap items-center gap-x-10 gap-y-4">
        {button}
        <span id={ownId} className="text-note text-ink-2">
          {reason}
        </span>
      </span>
    );
  }
  if (href !== undefined) {
    return (
      <a href={href} className={buttonClass(looks)}>
        {words}
      </a>
    );
  }
  return (
    <button type="button" {...rest} className={buttonClass(looks)}>
      {words}
    </button>
  );
}
