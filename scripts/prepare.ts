import { letIn } from '@/db/app-role';
import { closeConnection } from '@/db/client';
import { migrate } from '@/db/migrate';
import { seedDemo } from '@/db/seed/demo';
import { DEMO_PASSWORD, demoAccounts } from '@/features/account/demo';
import { installQueue } from '@/services/queue';

/**
 * As the database's owner (DATABASE_URL): migrations, the queue's tables, and the role of APP_DATABASE_URL, which web
 * and worker sign in with. With --demo also the demo practice; then it prints who can sign in there.
 */
const owner = process.env['DATABASE_URL'];
const app = process.env['APP_DATABASE_URL'];
if (!owner) throw new Error('DATABASE_URL is not set: give the connection of the database’s owner');

let hasDemo = false;
await migrate(owner, async () => {
  await installQueue(owner);
  if (app) await letIn(owner, app);
  if (process.argv.includes('--demo')) hasDemo = await seedDemo();
});
await closeConnection();
if (hasDemo) console.log(signIns());

function signIns(): string {
  const accounts = demoAccounts();
  const width = Math.max(...accounts.map(({ email }) => email.length));
  const lines = accounts.map(({ email, name, role }) => `  ${email.padEnd(width)}  ${name}, ${role}`);
  return ['Sign in to the demo practice as', ...lines, `with the password ${DEMO_PASSWORD}`].join('\n');
}
