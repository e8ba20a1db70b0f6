import { useId } from 'react';
import { Button } from './Button';

/** One thing the sheet can do. A form's id makes it the submit button of that form. */
export interface BlockAction {
  label: string;
  keyName?: string | undefined;
  href?: string | undefined;
  form?: string | undefined;
  name?: string | undefined;
  value?: string | undefined;
  onPress?: (() => void) | undefined;
  /** Why it cannot be done now. */
  reason?: string | undefined;
  /** The reason is no fault: there is nothing to do. */
  isQuiet?: boolean | undefined;
}

interface ActionProps {
  action: BlockAction;
  tone: 'inverted' | 'outlined';
  /** Id of the element that gives the reason, where there is one. */
  reasonId: string;
}

/** One element whether it can be pressed or not, so that a press that turns it off keeps the focus. */
export function ActionButton({ action, tone, reasonId }: ActionProps) {
  const { label, href, form, onPress, reason, ...rest } = action;
  return (
    <Button
      tone={tone}
      size="block"
      href={href}
      keyName={rest.keyName}
      form={form}
      name={rest.name}
      value={rest.value}
      type={form ? 'submit' : 'button'}
      onClick={onPress}
      reasonId={reason === undefined ? undefined : reasonId}
    >
      {label}
    </Button>
  );
}

export function MainAction({ action }: { action: BlockAction }) {
  const id = useId();
  return (
    <>
      <div className="col-span-6 grid p-0 [&_button,&_a]:min-h-52 [&_button,&_a]:text-[1.0625rem]">
        <ActionButton action={action} tone="inverted" reasonId={id} />
      </div>
      {action.reason !== undefined && (
        <p
          id={id}
          className={`col-span-6 text-center text-schedule ${action.isQuiet ? 'text-ink-2' : 'font-semibold text-error'}`}
        >
          {action.reason}
        </p>
      )}
    </>
  );
}

/** The first two, side by side. */
export function OtherActions({ actions: [first, second] }: { actions: readonly BlockAction[] }) {
  const span = second ? 'col-span-3' : 'col-span-6';
  return (
    <>
      {first && <OtherAction action={first} span={span} />}
      {second && <OtherAction action={second} span={span} />}
    </>
  );
}

function OtherAction({ action, span }: { action: BlockAction; span: string }) {
  const id = useId();
  const { reason } = action;
  return (
    <div className={`grid p-0 ${reason === undefined ? '' : 'content-start'} ${span}`}>
      <ActionButton action={action} tone="outlined" reasonId={id} />
      {reason !== undefined && (
        <span id={id} className="px-10 py-6 text-center text-note text-ink-2">
          {reason}
        </span>
      )}
    </div>
  );
}
