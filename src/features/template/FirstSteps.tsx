import type { ReactNode } from 'react';
import { Schematic } from '@/components/drawing/Schematic';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import { ARRANGEMENT_GLYPHS } from './glyphs';

/** How a template becomes a member, drawn. */
export function FirstSteps({ letter }: { readonly letter: string }) {
  return (
    <section className="zone">
      <ZoneHeading letter={letter}>From template to checked member</ZoneHeading>
      <ol className="[&>li+li]:border-t [&>li+li]:border-rule">
        <Step picture={<Schematic size="glyph" beam={ARRANGEMENT_GLYPHS['propped-cantilever']} />}>
          Pick a template that matches the supports and loads.
        </Step>
        <Step picture={<LoadAndSpan />}>
          Choose a job and give the span and loads. Results draw as you type.
        </Step>
        <Step picture={<BlockPicture />}>
          Choose a section and save. The server evaluates the member and keeps its proof.
        </Step>
      </ol>
    </section>
  );
}

interface StepProps {
  readonly picture: ReactNode;
  readonly children: ReactNode;
}

function Step({ picture, children }: StepProps) {
  return (
    <li className="grid grid-cols-[84px_minmax(0,1fr)] items-center gap-12 py-10 first:pt-0 last:pb-0">
      <span className="grid justify-items-center">{picture}</span>
      <span>{children}</span>
    </li>
  );
}

const ARROWS = [6, 20, 34, 48, 62, 76];

function LoadAndSpan() {
  return (
    <svg className="drawing" viewBox="0 0 82 48" aria-hidden="true">
      <path className="load-cap" d="M6 3H76" />
      <path className="load" d={ARROWS.map((x) => `M${x} 3v10M${x} 13l-2 -4h4z`).join('')} />
      <path className="schematic-member" d="M6 17H76" />
      <path className="dimension" d="M6 41H76" />
      <path className="dimension-extension" d="M6 28V45M76 28V45" />
      <path className="dimension-tick" d="M3 44l6 -6M73 44l6 -6" />
      <text x="41" y="37" textAnchor="middle">
        7.200
      </text>
    </svg>
  );
}

function BlockPicture() {
  return (
    <svg className="drawing" viewBox="0 0 82 42" aria-hidden="true">
      <path className="thin" d="M4 4H78V38H4ZM4 15H78M4 26H78M28 26V38M53 26V38" />
      <path className="fine" d="M31 35c3 -8 4 2 7 -4s3 4 8 -1M56 34c2 -6 5 1 7 -3s4 3 9 0" />
    </svg>
  );
}
