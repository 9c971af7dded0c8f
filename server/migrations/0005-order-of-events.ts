/**
 * Events of one model are numbered in the order in which they are committed. A number from a
 * sequence alone is drawn earlier: a browser that has seen event 12 would never hear of an event 11
 * that is committed after it.
 */
import type { Migration } from './migration.ts';

export const orderOfEvents: Migration = {
  name: '0005-order-of-events',
  up: `
    CREATE FUNCTION number_derivation_event() RETURNS trigger LANGUAGE plpgsql AS $$
    BEGIN
      PERFORM pg_advisory_xact_lock(hashtextextended(NEW.model_id::text, 620188));
      NEW.id := nextval('derivation_events_id_seq');
      RETURN NEW;
    END $$;
    CREATE TRIGGER derivation_events_number BEFORE INSERT ON derivation_events
      FOR EACH ROW EXECUTE FUNCTION number_derivation_event();
  `,
  down: `
    DROP TRIGGER derivation_events_number ON derivation_events;
    DROP FUNCTION number_derivation_event();
  `,
};
