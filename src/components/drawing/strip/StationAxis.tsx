import { memo } from 'react';
import { roundStep } from '@/lib/round-step';
import type { DrawingFormat } from '../format';
import { type Frame, xOf } from './frame';

/** Stations of whole units, as many as leave `room` px between them. */
function stationsOf(frame: Frame, format: DrawingFormat, room: number): { step: number; stations: number[] } {
  const unit = format.station.step;
  const step = Math.max(1, roundStep(room / (frame.perMetre * unit)));
  const count = Math.floor((frame.length / (unit * step)) * (1 + 1e-9));
  return { step: unit * step, stations: Array.from({ length: count + 1 }, (_, i) => i * step) };
}

export const StationAxis = memo(function StationAxis({
  frame,
  format,
  y,
  from,
}: {
  frame: Frame;
  format: DrawingFormat;
  y: number;
  from: string;
}) {
  const { step, stations } = stationsOf(frame, format, frame.mode === 'phone' ? 34 : 46);
  const unit = format.station.step;
  const end = frame.length / step;
  const ticks = Array.from({ length: Math.floor(end * 2 * (1 + 1e-9)) + 1 }, (_, i) => {
    const x = xOf(frame, (i * step) / 2);
    return `M${x} ${y}v${i % 2 === 0 ? 7 : 4}`;
  });
  return (
    <g>
      <path className="fine" d={ticks.join('')} />
      {stations.map((station) => (
        <text key={station} x={xOf(frame, station * unit)} y={y + 19} textAnchor="middle" className="axis">
          {station}
        </text>
      ))}
      {frame.mode !== 'phone' && (
        <text x={frame.mode === 'print' ? 10 : 14} y={y + 20} className="note">
          {`Station from ${from}, ${format.station.unit}`}
        </text>
      )}
    </g>
  );
});

/** Faint lines behind the diagrams at the stations. */
export function stationLines(frame: Frame, format: DrawingFormat, top: number, bottom: number): string {
  const { stations } = stationsOf(frame, format, frame.mode === 'phone' ? 34 : 46);
  return stations.map((station) => `M${xOf(frame, station * format.station.step)} ${top}V${bottom}`).join('');
}
