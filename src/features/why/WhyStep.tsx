import type { ReactNode } from 'react';
import { Why } from './Why';

interface WhyStepProps {
  readonly id: string;
  readonly children: ReactNode;
}

/** Steps of a derivation that come to one number. */
const TRACED = /^(gap|flexibility|reciprocal|redundant|equilibrium)-|^(compatibility|closed-form)$/;

/** What a step of the derivation comes to. */
export const WhyStep = ({ id, children }: WhyStepProps) =>
  TRACED.test(id) ? <Why question={() => ({ kind: 'step', id })}>{children}</Why> : children;
