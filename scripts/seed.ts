import { closeConnection } from '@/db/client';
import { seedDemo } from '@/db/seed/demo';
import { DEMO_PASSWORD, demoAccounts } from '@/features/account/demo';

/** As the database's owner (DATABASE_URL). Prints who can sign in to the demo practice. */
if (await seedDemo()) {
  const accounts = demoAccounts();
  const width = Math.max(...accounts.map(({ email }) => email.length));
  console.log('Sign in to the demo practice as');
  for (const { email, name, role } of accounts) console.log(`  ${email.padEnd(width)}  ${name}, ${role}`);
  console.log(`with the password ${DEMO_PASSWORD}`);
}
await closeConnection();
