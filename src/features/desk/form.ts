import { AppError, type Fault } from '@/lib/app-error';

/** What a page's form came to: somewhere to go on, or what is wrong with it. */
export type Outcome = { readonly kind: 'done'; readonly to: string } | Refusal;

export interface Refusal {
  readonly kind: 'refused';
  readonly status: number;
  readonly faults: readonly Fault[];
  /** What stands there now, where somebody else wrote in between. */
  readonly current: unknown;
}

/** Does what a form asks. What a person can put right is said on the page; the rest is the middleware's. */
export async function attempt(act: () => Promise<string>): Promise<Outcome> {
  try {
    return { kind: 'done', to: await act() };
  } catch (error) {
    if (!(error instanceof AppError) || error.status >= 500) throw error;
    return { kind: 'refused', status: error.status, faults: error.faults, current: error.current };
  }
}

export const textOf = (form: FormData, name: string): string => {
  const value = form.get(name);
  return typeof value === 'string' ? value.replaceAll('\r\n', '\n') : '';
};

/** What a choice says that may be left open. */
export const choiceOf = (form: FormData, name: string): string | null => textOf(form, name) || null;

export const unknownAct = (): AppError =>
  new AppError('invalid', 'This form is not known here. Load the page again.');

/** One form of a page as it is shown: with what was typed and what is wrong, where it was refused. */
export interface FormView {
  readonly isRefused: boolean;
  readonly value: (name: string, usual?: string) => string;
  readonly error: (name: string) => string | undefined;
  /** Faults that belong to none of these fields. */
  readonly others: (...fields: readonly string[]) => readonly Fault[];
}

/** The forms of a page by the act (and the id) that each names. */
export const formsOf =
  (form: FormData | null, refusal: Refusal | null) =>
  (act: string, id = ''): FormView => {
    const given = form && textOf(form, 'act') === act && textOf(form, 'id') === id ? form : null;
    const faults = given && refusal ? refusal.faults : [];
    return {
      isRefused: given !== null && refusal !== null,
      value: (name, usual = '') => (given?.has(name) ? textOf(given, name) : usual),
      error: (name) => faults.find(({ pointer }) => pointer === `/${name}`)?.message,
      others: (...fields) => faults.filter(({ pointer }) => !fields.includes(pointer.slice(1))),
    };
  };
