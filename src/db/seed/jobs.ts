import type { Tx } from '../client';
import { job } from '../schema/job';

const JOBS = [
  {
    number: 'Q-2417',
    name: 'Larkfold School hall extension',
    client: 'Larkfold Learning Trust',
    area: 'Hall roof, folding partition and plant deck',
    basis:
      'EN 1990 to EN 1995 with UK National Annexes. Steel S355, timber C24. Snow 0.60 kN/m² on the roof, imposed 5.0 kN/m² on the plant deck. Deflection under imposed load span/360, 10 mm over the folding partition. Peer check.',
    unitSystem: 'metric',
    by: 'Tomasz Brindle',
  },
  {
    number: 'Q-2431',
    name: 'Brackenhythe House alterations',
    client: '',
    area: 'Ground-floor opening, first floor and roof',
    basis:
      'EN 1990 to EN 1995 with UK National Annexes. Timber C24 and GL24h, one steel beam S355. Imposed 1.5 kN/m² on floors, snow 0.60 kN/m². An independent figure for every member, since the author is a graduate.',
    unitSystem: 'metric',
    by: 'Kofi Danesmoor',
  },
  {
    number: 'Q-2440',
    name: 'Pellam Creek Library reading wing',
    client: '',
    area: 'Reading wing, roof, floor and entrance canopy',
    basis:
      'ASCE 7-16. Steel floors by AISC 360-22 strength design, roof and timber by allowable stress. Floor dead 60 psf, live 80 psf; roof dead 15 psf, snow 30 psf. Live-load deflection span/360, total span/240.',
    unitSystem: 'us',
    by: 'Tomasz Brindle',
  },
] as const;

/** The demo's jobs, each begun by its engineer; `people` gives a person's id by name. */
export async function seedJobs(
  tx: Tx,
  practiceId: string,
  people: ReadonlyMap<string, string>,
): Promise<void> {
  for (const { by, ...rest } of JOBS) {
    const createdById = people.get(by);
    if (!createdById) throw new Error(`The demo’s jobs name ${by}, who is not among its people`);
    await tx.insert(job).values({ practiceId, createdById, ...rest });
  }
}
