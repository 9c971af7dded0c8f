/**
 * The whole outcome of a derivation stands once it is there, and the database computes its hash
 * again. How often a derivation was begun and what derived it are kept beside it.
 */
import type { Migration } from './migration.ts';

export const standingResults: Migration = {
  name: '0008-standing-results',
  up: `
    DROP TRIGGER derivations_keep_result ON derivations;
    DROP FUNCTION keep_result();
    ALTER TABLE derivations
      ADD COLUMN attempts integer NOT NULL DEFAULT 0 CHECK (attempts >= 0),
      ADD COLUMN engine text;
    UPDATE derivations SET result_hash =
      encode(sha256(convert_to(result || E'\\n' || verification, 'UTF8')), 'hex');
    ALTER TABLE derivations
      ADD CONSTRAINT derivations_whole_result CHECK (
        (result IS NULL) = (verification IS NULL)
        AND (result IS NULL) = (verification_status IS NULL)
        AND (result IS NULL) = (result_hash IS NULL)
      ),
      ADD CONSTRAINT derivations_result_hash CHECK (
        result_hash = encode(sha256(convert_to(result || E'\\n' || verification, 'UTF8')), 'hex')
      );
    CREATE FUNCTION keep_result() RETURNS trigger LANGUAGE plpgsql AS $$
    BEGIN
      IF OLD.result IS NOT NULL AND (
        NEW.result IS DISTINCT FROM OLD.result
        OR NEW.verification IS DISTINCT FROM OLD.verification
        OR NEW.verification_status IS DISTINCT FROM OLD.verification_status
        OR NEW.engine IS DISTINCT FROM OLD.engine
      ) THEN
        RAISE EXCEPTION 'the result of a derivation never changes'
          USING ERRCODE = 'restrict_violation';
      END IF;
      RETURN NEW;
    END $$;
    CREATE TRIGGER derivations_keep_result BEFORE UPDATE ON derivations
      FOR EACH ROW EXECUTE FUNCTION keep_result();
    CREATE TRIGGER derivations_stay BEFORE DELETE ON derivations
      FOR EACH ROW EXECUTE FUNCTION refuse_change();
  `,
  down: `
    DROP TRIGGER derivations_stay ON derivations;
    DROP TRIGGER derivations_keep_result ON derivations;
    DROP FUNCTION keep_result();
    ALTER TABLE derivations
      DROP CONSTRAINT derivations_result_hash,
      DROP CONSTRAINT derivations_whole_result,
      DROP COLUMN engine,
      DROP COLUMN attempts;
    UPDATE derivations SET result_hash = encode(sha256(convert_to(result, 'UTF8')), 'hex');
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
  `,
};
