import type { Role } from './roles';

/** The same for everybody, and only in a demo: the sign-in page shows it. */
export const DEMO_PASSWORD = 'beams-for-everyone';

interface DemoPerson {
  readonly name: string;
  readonly title: string;
  readonly roles: readonly Role[];
}

/** The invented people of the demo practice. */
export const DEMO_PEOPLE: readonly DemoPerson[] = [
  { name: 'Ansel Thornquay', title: 'Principal', roles: ['principal'] },
  { name: 'Priyanka Velloor', title: 'Associate and librarian', roles: ['librarian', 'engineer'] },
  { name: 'Tomasz Brindle', title: 'Engineer', roles: ['engineer'] },
  { name: 'Imogen Fairlocke', title: 'Senior engineer and checker', roles: ['checker', 'engineer'] },
  { name: 'Kofi Danesmoor', title: 'Graduate engineer', roles: ['engineer'] },
  { name: 'Marisol Okonta', title: 'Systems administrator', roles: ['administrator'] },
];

/** first.last@quillmere.example */
export const demoEmail = (name: string): string =>
  `${name.toLowerCase().replaceAll(' ', '.')}@quillmere.example`;

/** What the sign-in page of a demo offers: a press on a name signs in. */
export const demoAccounts = () =>
  DEMO_PEOPLE.map(({ name, title }) => ({
    name,
    role: title,
    email: demoEmail(name),
    password: DEMO_PASSWORD,
  }));
