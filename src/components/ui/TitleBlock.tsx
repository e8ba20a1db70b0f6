import { type ReactNode, useId } from 'react';
import { Button } from './Button';
import { type SheetStatus, StatusStamp } from './StatusStamp';

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

export interface RevisionRow {
  revision: string;
  date: string;
  by: string;
  checked?: string | undefined;
  change: string;
}

export interface TitleBlockProps {
  /** The practice, or the job when `jobNumber` is given. */
  org: string;
  orgNote?: string | undefined;
  jobNumber?: string | undefined;
  /** What the title names: Template, Member, Job, Section table. */
  kind: string;
  title: string;
  by?: string | undefined;
  checked?: string | undefined;
  date?: string | undefined;
  status?: SheetStatus | undefined;
  statusWord?: string | undefined;
  reference?: string | undefined;
  revision?: string | undefined;
  /** Newest first. */
  revisions?: readonly RevisionRow[];
  action?: BlockAction | undefined;
  others?: readonly BlockAction[];
  /** Note or form compartments above the actions. */
  children?: ReactNode;
}

/** Bottom right of every sheet: whose it is, where it stands, and the one main action. */
export function TitleBlock(props: TitleBlockProps) {
  const { org, orgNote, jobNumber, kind, title, status, reference, revision, revisions, others } = props;
  const identity = status !== undefined || reference !== undefined || revision !== undefined;
  return (
    <section id="title-block" data-title-block tabIndex={-1} aria-label="Title block" className="title-block">
      {revisions && revisions.length > 0 && <RevisionList rows={revisions} />}
      {jobNumber === undefined ? (
        <div className="col-span-6 flex items-center gap-9 py-8">
          <span className="text-zone font-normal">{org}</span>
          {orgNote && <span className="ml-auto text-ink-2">{orgNote}</span>}
        </div>
      ) : (
        <>
          <Compartment span="col-span-4" label="Job" value={org} />
          <Compartment span="col-span-2" label="Job no." value={jobNumber} />
        </>
      )}
      <div className="col-span-6">
        <Label>{kind}</Label>
        <p className="text-title break-words">{title}</p>
      </div>
      <Compartment span="col-span-2" label="By" value={props.by} signed />
      <Compartment span="col-span-2" label="Checked" value={props.checked} signed />
      <Compartment span="col-span-2" label="Date" value={props.date} />
      {identity && (
        <>
          <div className="col-span-3">
            <Label>Status</Label>
            <div className="pt-5">
              {status ? <StatusStamp status={status} word={props.statusWord} /> : <Unsigned />}
            </div>
          </div>
          <Compartment span="col-span-2" label="Ref" value={reference} size="text-ref" />
          <Compartment span="col-span-1" label="Rev" value={revision ?? '–'} size="text-revision" />
        </>
      )}
      {props.children}
      {props.action && <MainAction action={props.action} />}
      {others && others.length > 0 && <OtherActions actions={others} />}
    </section>
  );
}

function Label({ children }: { children: ReactNode }) {
  return <span className="caps mb-1 block">{children}</span>;
}

/** A dashed line: nobody has signed here yet. */
function Unsigned() {
  return (
    <>
      <span
        aria-hidden="true"
        className="block h-19 w-76 max-w-full border-b-[1.5px] border-dashed border-ink-2"
      />
      <span className="sr-only">not yet</span>
    </>
  );
}

interface CompartmentProps {
  span: string;
  label: string;
  value?: string | undefined;
  size?: string;
  signed?: boolean;
}

export function Compartment({
  span,
  label,
  value,
  size = 'text-zone font-normal leading-19',
  signed,
}: CompartmentProps) {
  return (
    <div className={span}>
      <Label>{label}</Label>
      {value === undefined || value === '' ? (
        <Unsigned />
      ) : (
        <p className={`${size} break-words ${signed ? 'italic' : ''}`}>{value}</p>
      )}
    </div>
  );
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

function MainAction({ action }: { action: BlockAction }) {
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

function OtherActions({ actions }: { actions: readonly BlockAction[] }) {
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

function RevisionList({ rows }: { rows: readonly RevisionRow[] }) {
  return (
    <div className="col-span-6 p-0">
      <table className="w-full border-collapse text-left text-schedule leading-17">
        <thead>
          <tr className="caps">
            <th scope="col" className="w-34 py-5 pl-10">
              Rev
            </th>
            <th scope="col">Date</th>
            <th scope="col">By</th>
            <th scope="col">Chk</th>
            <th scope="col">Change</th>
          </tr>
        </thead>
        <tbody className="[&_td]:border-t [&_td]:border-rule [&_td]:py-5 [&_td]:pr-8 [&_td]:align-top">
          {rows.map((row, index) => (
            <tr key={row.revision} className={index === 0 ? '[&>td]:border-ink!' : ''}>
              <td className={`pl-10 ${index === 0 ? 'font-semibold' : ''}`}>{row.revision}</td>
              <td className="whitespace-nowrap">{row.date}</td>
              <td className="italic">{row.by}</td>
              <td className="italic">{row.checked ?? '–'}</td>
              <td>{row.change}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
