/** Versions that stand still, their derivations, the outbox and the record of events. */
import type { Migration } from './migration.ts';

export const versions: Migration = {
  name: '0003-versions',
  up: `
    CREATE TABLE versions (
      id uuid PRIMARY KEY,
      model_id uuid NOT NULL REFERENCES models,
      number integer NOT NULL CHECK (number >= 1),
      source text NOT NULL CHECK (octet_length(source) <= 65536),
      normalized_source text NOT NULL,
      hash text NOT NULL
        CHECK (hash = encode(sha256(convert_to(normalized_source, 'UTF8')), 'hex')),
      note text NOT NULL,
      frozen_by_id uuid NOT NULL REFERENCES people,
      frozen_at timestamptz NOT NULL,
      UNIQUE (model_id, number)
    );
    CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql AS $$
    BEGIN
      RAISE EXCEPTION 'a version never changes' USING ERRCODE = 'restrict_violation';
    END $$;
    CREATE TRIGGER versions_stand_still BEFORE UPDATE OR DELETE ON versions
      FOR EACH ROW EXECUTE FUNCTION refuse_change();
    CREATE TRIGGER versions_stay BEFORE TRUNCATE ON versions
      FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();

    CREATE TABLE derivations (
      id uuid PRIMARY KEY,
      version_id uuid NOT NULL UNIQUE REFERENCES versions,
      state text NOT NULL
        CHECK (state IN ('queued', 'deriving', 'verifying', 'complete', 'failed', 'cancelled')),
      progress double precision NOT NULL CHECK (progress BETWEEN 0 AND 1),
      stage text NOT NULL,
      fault text,
      result text,
      result_hash text,
      verification text,
      verification_status text CHECK (verification_status IN ('passed', 'failed', 'undecided')),
      round integer NOT NULL CHECK (round >= 1),
      cancel_requested boolean NOT NULL,
      updated_at timestamptz NOT NULL,
      CHECK (state <> 'complete' OR (result IS NOT NULL AND verification IS NOT NULL))
    );
    CREATE INDEX derivations_open ON derivations (updated_at)
      WHERE state IN ('queued', 'deriving', 'verifying');

    -- A result that stands is never replaced by another one.
    CREATE FUNCTION keep_result() RETURNS trigger LANGUAGE plpgsql AS $$
    BEGIN
      IF OLD.result_hash IS NOT NULL AND NEW.result_hash IS DISTINCT FROM OLD.result_hash THEN
        RAISE EXCEPTION 'the result of a derivation never changes'
          USING ERRCODE = 'restrict_violation';
      END IF;
      RETURN NEW;
    END $$;
    CREATE TRIGGER derivations_keep_result BEFORE UPDATE ON derivations
      FOR EACH ROW EXECUTE FUNCTION keep_result();

    CREATE TABLE outbox (
      id bigserial PRIMARY KEY,
      derivation_id uuid NOT NULL REFERENCES derivations,
      round integer NOT NULL,
      created_at timestamptz NOT NULL DEFAULT now(),
      dispatched_at timestamptz
    );
    CREATE INDEX outbox_waiting ON outbox (id) WHERE dispatched_at IS NULL;

    CREATE TABLE derivation_events (
      id bigserial PRIMARY KEY,
      model_id uuid NOT NULL REFERENCES models,
      version_id uuid NOT NULL REFERENCES versions,
      version_number integer NOT NULL,
      derivation jsonb NOT NULL,
      at timestamptz NOT NULL DEFAULT now()
    );
    CREATE INDEX derivation_events_model ON derivation_events (model_id, id);
    CREATE FUNCTION announce_derivation() RETURNS trigger LANGUAGE plpgsql AS $$
    BEGIN
      PERFORM pg_notify('derivation_event', NEW.model_id::text);
      RETURN NEW;
    END $$;
    CREATE TRIGGER derivation_events_announce AFTER INSERT ON derivation_events
      FOR EACH ROW EXECUTE FUNCTION announce_derivation();

    CREATE TABLE events (
      id bigserial PRIMARY KEY,
      group_id uuid NOT NULL REFERENCES groups ON DELETE CASCADE,
      person_id uuid REFERENCES people,
      kind text NOT NULL,
      model_id uuid REFERENCES models ON DELETE CASCADE,
      title text NOT NULL,
      version_number integer,
      at timestamptz NOT NULL
    );
    CREATE INDEX events_group ON events (group_id, id DESC);
  `,
  down: `
    DROP TABLE events;
    DROP TABLE derivation_events;
    DROP FUNCTION announce_derivation();
    DROP TABLE outbox;
    DROP TABLE derivations;
    DROP FUNCTION keep_result();
    DROP TABLE versions;
    DROP FUNCTION refuse_change();
  `,
};
