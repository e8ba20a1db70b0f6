import { closeConnection } from '@/db/client';
import { createApiToken } from '@/features/account/token.server';
import { AppError } from '@/lib/app-error';

/** Prints a new bearer token of the person with this e-mail address, alone on standard output. */
const [email, ...rest] = process.argv.slice(2);

if (!email || rest.length > 0) {
  console.error('Give one e-mail address: npm run token -- EMAIL');
  process.exitCode = 1;
} else {
  try {
    console.log(await createApiToken(email));
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    console.error(error.message);
    process.exitCode = 1;
  } finally {
    await closeConnection();
  }
}
