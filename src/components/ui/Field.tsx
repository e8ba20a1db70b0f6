import { type ComponentProps, type ReactNode, useId } from 'react';

interface FrameProps {
  label: ReactNode;
  /** Plain help under the field; gives way to the error. */
  help?: ReactNode;
  helpHref?: string | undefined;
  error?: string | undefined;
  /** Id of the control inside. */
  controlId: string;
  children: ReactNode;
}

const noteId = (controlId: string) => `${controlId}-note`;

/** Label above, control, then one line that is either help or what is wrong. */
function FieldFrame({ label, help, helpHref, error, controlId, children }: FrameProps) {
  return (
    <div className="min-w-0">
      <label htmlFor={controlId} className="caps mb-2 block">
        {label}
      </label>
      {children}
      <FieldNote id={noteId(controlId)} help={help} helpHref={helpHref} error={error} />
    </div>
  );
}

interface NoteProps {
  id: string;
  help?: ReactNode;
  helpHref?: string | undefined;
  error?: string | undefined;
}

export function FieldNote({ id, help, helpHref, error }: NoteProps) {
  if (error) {
    return (
      <p id={id} role="alert" className="mt-4 text-note leading-16 font-semibold text-error">
        {error}
      </p>
    );
  }
  if (!help && !helpHref) return null;
  return (
    <p id={id} className="mt-4 text-note leading-16 text-ink-2">
      {help}{' '}
      {helpHref && (
        <a href={helpHref} className="whitespace-nowrap">
          More
        </a>
      )}
    </p>
  );
}

type Shared = Omit<FrameProps, 'controlId' | 'children'>;

const attributesOf = (id: string, { help, helpHref, error }: Shared) => ({
  id,
  'aria-describedby': help || helpHref || error ? noteId(id) : undefined,
  'aria-invalid': error ? true : undefined,
});

type FieldProps = Shared & Omit<ComponentProps<'input'>, 'className' | 'children'>;

export function Field({ label, help, helpHref, error, id, ...input }: FieldProps) {
  const ownId = useId();
  const frame = { label, help, helpHref, error };
  const controlId = id ?? ownId;
  return (
    <FieldFrame {...frame} controlId={controlId}>
      <input {...input} {...attributesOf(controlId, frame)} className="input" />
    </FieldFrame>
  );
}

type TextFieldProps = Shared & Omit<ComponentProps<'textarea'>, 'className' | 'children'>;

export function TextField({ label, help, helpHref, error, id, rows = 3, ...area }: TextFieldProps) {
  const ownId = useId();
  const frame = { label, help, helpHref, error };
  const controlId = id ?? ownId;
  return (
    <FieldFrame {...frame} controlId={controlId}>
      <textarea {...area} rows={rows} {...attributesOf(controlId, frame)} className="input" />
    </FieldFrame>
  );
}

interface Choice {
  value: string;
  label: string;
  /** Why it cannot be chosen now. */
  reason?: string | undefined;
}

type ChoiceFieldProps = Shared &
  Omit<ComponentProps<'select'>, 'className' | 'children'> & { choices: readonly Choice[] };

export function ChoiceField({ label, help, helpHref, error, id, choices, ...select }: ChoiceFieldProps) {
  const ownId = useId();
  const frame = { label, help, helpHref, error };
  const controlId = id ?? ownId;
  return (
    <FieldFrame {...frame} controlId={controlId}>
      <select {...select} {...attributesOf(controlId, frame)} className="input">
        {choices.map(({ value, label: word, reason }) => (
          <option key={value} value={value} disabled={reason !== undefined}>
            {reason === undefined ? word : `${word} (${reason})`}
          </option>
        ))}
      </select>
    </FieldFrame>
  );
}
