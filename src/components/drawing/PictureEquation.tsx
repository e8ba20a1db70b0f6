import type { Picture } from './force-method-pictures';
import { RichHtml } from './marks/RichHtml';
import { Schematic } from './Schematic';

type Props = {
  released: Picture;
  units: readonly Picture[];
  built: Picture;
  label: string;
};

/**
 * Released case, and each redundant times its unit case, make the member as built. Superposed pictures add: the unit force
 * is drawn the way it acts, and its deflection with it.
 */
export function PictureEquation({ released, units, built, label }: Props) {
  const pictures = [released, ...units, built];
  return (
    <figure className="picture-equation" role="img" aria-label={label}>
      {pictures.map(({ caption, ...picture }, i) => (
        <div key={caption} className="picture-term">
          {i > 0 && <span className="picture-sign">{i === pictures.length - 1 ? '=' : '+'}</span>}
          <div>
            <Schematic {...picture} width={206} />
            <p>
              <RichHtml text={caption} />
            </p>
          </div>
        </div>
      ))}
    </figure>
  );
}
