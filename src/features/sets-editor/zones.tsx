/** What the form of each kind of set is made of, in the order in which it is written. */
import type { ComponentType } from 'react';
import type { SetKind } from '@/features/review/read-set';
import { CategoryZone } from './CategoryZone';
import { ChangesZone } from './ChangesZone';
import { CombinationZone } from './CombinationZone';
import { CriteriaHead, DeflectionZone, ReferenceZone, StressZone } from './CriteriaZones';
import { FactorTools } from './FactorTools';
import { CombinationHead, GroupZone, TitleFields } from './HeadZone';
import { LimitPreview } from './LimitPreview';
import { BandZone, MaterialZone } from './MaterialZone';
import { PatternZone } from './PatternZone';
import { PreviewZone } from './PreviewZone';
import type { ZoneProps } from './page';

export type Zone = readonly [title: string, Fields: ComponentType<ZoneProps>];

interface Form {
  readonly form: readonly Zone[];
  /** Beside the form. */
  readonly side: readonly Zone[];
}

export const ZONES: Readonly<Record<SetKind, Form>> = {
  'combination-set': {
    form: [
      ['Title', CombinationHead],
      ['Groups of loads', GroupZone],
      ['Combinations', StrengthZone],
      ['Service combinations', ServiceZone],
      ['ψ by category', CategoryZone],
      ['How the loads stand', PatternZone],
    ],
    side: [['As they are used', ({ data }) => <PreviewZone issued={data.issued?.document ?? null} />]],
  },
  'material-set': {
    form: [
      ['Title', MaterialHead],
      ['Steel', () => <MaterialZone kind="steel" />],
      ['Strength of steel by thickness', BandZone],
      ['Timber by European classes', () => <MaterialZone kind="timber_en" />],
      ['Timber by American grades', () => <MaterialZone kind="timber_nds" />],
    ],
    side: [['Changed', ChangesZone]],
  },
  criteria: {
    form: [
      ['Title', CriteriaHead],
      ['Combinations', ReferenceZone],
      ['Stresses', StressZone],
      ['Deflections', DeflectionZone],
    ],
    side: [
      ['As they are used', LimitPreview],
      ['Changed', ChangesZone],
    ],
  },
};

function StrengthZone() {
  return (
    <CombinationZone list="/strength" caption="Every one is run on a member with loads of its groups">
      <FactorTools />
    </CombinationZone>
  );
}

function ServiceZone() {
  return <CombinationZone list="/service" caption="Criteria name one of them for each limit of deflection" />;
}

function MaterialHead() {
  return (
    <div className="grid gap-12">
      <TitleFields example="Materials EN steel 2" />
    </div>
  );
}
