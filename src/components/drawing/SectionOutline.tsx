import { type DrawingFormat, figure } from './format';
import { groundHatch } from './geometry/hatch';
import { commonScale, type OutlinedSection } from './section/outlined';
import { ScaleBar } from './section/ScaleBar';
import { SectionFigure } from './section/SectionFigure';

type Props = {
  section: OutlinedSection;
  format: DrawingFormat;
  width?: number | undefined;
  tallest?: number | undefined;
};

/** What the outline shows, in words. */
export function outlineLabel(
  { name, outline, axes, detail }: OutlinedSection,
  format: DrawingFormat,
): string {
  const size = (mm: number) => figure(format, 'sectionSize', mm / 1000);
  const sizes = `${name}: depth ${size(outline.height)}, width ${size(outline.width)}; ${axes.major} is the major axis, ${axes.minor} the minor.`;
  const principal = detail?.principal ? ' u and v are the principal axes.' : '';
  return sizes + principal + (detail?.shearCentre ? ' M is the shear centre.' : '');
}

/** One section to scale. */
export function SectionOutline({ section, format, width = 240, tallest = 168 }: Props) {
  const scale = commonScale([section], width, tallest, 110);
  const ground = 46 + section.outline.height * scale;
  const height = ground + 58;
  return (
    <svg
      className="drawing schematic"
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      role="img"
      aria-label={outlineLabel(section, format)}
    >
      <path className="frame-line" d={`M20 ${ground}H${width - 20}`} />
      <path className="ground" d={groundHatch(20, ground, width - 40, 6)} />
      <SectionFigure section={section} scale={scale} cx={width / 2} ground={ground} format={format} />
      <ScaleBar scale={scale} right={width - 20} y={ground + 50} format={format} />
    </svg>
  );
}
