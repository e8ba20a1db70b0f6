import type { ReactNode } from 'react';
import { type BlockAction, MainAction, OtherActions } from './BlockActions';
import { RevisionList, type RevisionRow } from './RevisionList';
import { type SheetStatus, StatusStamp } from './StatusStamp';

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
  /** What the revision is called: an edition of a section table is no revision. */
  revisionLabel?: string | undefined;
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
      {revisions && revisions.length > 0 && <RevisionList rows={revisions} label={revisionLabelOf(props)} />}
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
      {(identity || props.by !== undefined || props.date !== undefined) && (
        <>
          <Compartment span="col-span-2" label="By" value={props.by} signed />
          <Compartment span="col-span-2" label="Checked" value={props.checked} signed />
          <Compartment span="col-span-2" label="Date" value={props.date} />
        </>
      )}
      {identity && <Identity {...props} />}
      {props.children}
      {props.action && <MainAction action={props.action} />}
      {others && others.length > 0 && <OtherActions actions={others} />}
    </section>
  );
}

const revisionLabelOf = ({ revisionLabel = 'Rev' }: TitleBlockProps): string => revisionLabel;

/** Where it stands: status, reference and revision, as far as it has them. */
function Identity(props: TitleBlockProps) {
  const { status, statusWord, reference, revision } = props;
  return (
    <>
      {status && (
        <div className="col-span-3">
          <Label>Status</Label>
          <div className="pt-5">
            <StatusStamp status={status} word={statusWord} />
          </div>
        </div>
      )}
      <Compartment
        span={status ? 'col-span-2' : revision ? 'col-span-5' : 'col-span-6'}
        label="Ref"
        value={reference}
        size={refSize(reference)}
      />
      {(status || revision) && (
        <Compartment
          span="col-span-1"
          label={revisionLabelOf(props)}
          value={revision ?? '–'}
          size="text-revision"
        />
      )}
    </>
  );
}

/** A long reference is set smaller, so that no word of it breaks. */
const refSize = (reference = '') => (reference.length > 8 ? 'text-[1rem] leading-28' : 'text-ref');

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

function Compartment({
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
