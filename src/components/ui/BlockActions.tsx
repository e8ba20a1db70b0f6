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
}

export function ActionButton({ action, tone }: { action: BlockAction; tone: 'inverted' | 'outlined' }) {
  const { label, href, form, onPress, ...rest } = action;
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
    >
      {label}
    </Button>
  );
}

export function MainAction({ action }: { action: BlockAction }) {
  const id = useId();
  if (action.reason === undefined) {
    return (
      <div className="col-span-6 grid p-0 [&_button,&_a]:min-h-52 [&_button,&_a]:text-[1.0625rem]">
        <ActionButton action={action} tone="inverted" />
      </div>
    );
  }
  return (
    <>
      <div className="col-span-6 grid p-0 [&_button,&_a]:min-h-52 [&_button,&_a]:text-[1.0625rem]">
        <Button size="block" reasonId={id}>
          {action.label}
        </Button>
      </div>
      <p id={id} className="col-span-6 text-center text-schedule font-semibold text-error">
        {action.reason}
      </p>
    </>
  );
}

export function OtherActions({ actions }: { actions: readonly BlockAction[] }) {
  const span = actions.length === 1 ? 'col-span-6' : 'col-span-3';
  return actions.map((action) => (
    <div key={action.label} className={`grid p-0 ${span}`}>
      {action.reason === undefined ? (
        <ActionButton action={action} tone="outlined" />
      ) : (
        <Button size="block" reason={action.reason}>
          {action.label}
        </Button>
      )}
    </div>
  ));
}
