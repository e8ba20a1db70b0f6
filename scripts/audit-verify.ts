import { closeConnection } from '@/db/client';
import { verifyAllChains } from '@/features/audit/audit.server';

/** Reads every practice's record of events from its first to its last, and says where one is broken. */
const reports = await verifyAllChains();
for (const { practiceId, head, fault } of reports) {
  console.log(`${practiceId}  ${head.sequence} events  ${fault ?? 'whole'}`);
  if (fault) process.exitCode = 1;
}
await closeConnection();
