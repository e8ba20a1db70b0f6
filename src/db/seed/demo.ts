import { proveIssued } from '@/features/proof/prove.server';
import { seedCombinations } from './combinations';
import { seedCriteria } from './criteria';
import { seedMaterials } from './materials';
import { seedMembers } from './members';
import { findDemoPeople, foundDemoPractice } from './people';
import { seedSections } from './sections';
import { seedStock } from './stock';
import { seedTemplates } from './templates';

/**
 * The demo practice and the library it starts with. What is there already stays as it is.
 * False where other practices use this database.
 */
export async function seedDemo(): Promise<boolean> {
  await foundDemoPractice();
  const people = await findDemoPeople();
  if (!people) return false;
  await seedSections(people);
  await seedStock(people);
  await seedMaterials(people);
  await seedCombinations(people);
  await seedCriteria(people);
  await seedTemplates(people);
  await seedMembers(people);
  // The worker proves over the whole parameter box what was issued on its proof cases.
  await proveIssued();
  return true;
}
