import { seedCombinations } from '@/db/seed/combinations';
import { seedCriteria } from '@/db/seed/criteria';
import { seedMaterials } from '@/db/seed/materials';
import { seedSections } from '@/db/seed/sections';
import { seedTemplates } from '@/db/seed/templates';
import { foundPractice, type Member } from './practice';

/** Fills a practice's library with what is shipped: written by its librarian, issued by its checker. */
export async function stockLibrary(librarian: Member, checker: Member): Promise<void> {
  const people = new Map([
    ['Priyanka Velloor', librarian],
    ['Imogen Fairlocke', checker],
  ]);
  await seedSections(people);
  await seedMaterials(people);
  await seedCombinations(people);
  await seedCriteria(people);
  await seedTemplates(people);
}

/** A practice with a full library, and the people whom jobs need. */
export async function foundStockedPractice() {
  const people = await foundPractice(['engineer'], ['engineer'], ['reader'], ['librarian'], ['checker']);
  const [engineer, colleague, reader, librarian, checker] = people;
  await stockLibrary(librarian, checker);
  return { engineer, colleague, reader, librarian, checker };
}
