import type { ComponentProps, ReactNode } from 'react';

type BoxProps = Omit<ComponentProps<'input'>, 'type' | 'className' | 'children'> & { children: ReactNode };

export function Checkbox({ children, ...input }: BoxProps) {
  return (
    <label className="choice">
      <input type="checkbox" {...input} />
      <span>{children}</span>
    </label>
  );
}

export function Radio({ children, ...input }: BoxProps) {
  return (
    <label className="choice">
      <input type="radio" {...input} />
      <span>{children}</span>
    </label>
  );
}

interface ChoiceSetProps {
  legend: ReactNode;
  children: ReactNode;
}

/** A named set of boxes or rings. */
export function ChoiceSet({ legend, children }: ChoiceSetProps) {
  return (
    <fieldset className="min-w-0">
      <legend className="caps mb-4">{legend}</legend>
      <div className="flex flex-col items-start">{children}</div>
    </fieldset>
  );
}
