/** Removes what has served its time: rows that only tell how something came to be. */
import type { Database } from '../server/database.ts';

/** A browser that has been away for longer reads everything afresh. */
const DELETIONS = [
  `DELETE FROM outbox WHERE dispatched_at < now() - interval '7 days'`,
  `DELETE FROM derivation_events WHERE at < now() - interval '7 days'`,
  `DELETE FROM registrations WHERE expires_at < now()`,
  `DELETE FROM email_tokens WHERE expires_at < now()`,
];

export async function clearAway({ sequelize }: Database): Promise<void> {
  for (const deletion of DELETIONS) await sequelize.query(deletion);
}
