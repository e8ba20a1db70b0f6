import { seedCriteria } from './criteria';
import { findDemoPeople, foundDemoPractice } from './people';

/**
 * The demo practice and the library it starts with. What is there already stays as it is.
 * False where other practices use this database.
 */
export async function seedDemo(): Promise<boolean> {
  await foundDemoPractice();
  const people = await findDemoPeople();
  if (!people) return false;
  await seedCriteria(people);
  return true;
}
