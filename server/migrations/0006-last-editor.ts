/** Two editors who leave at the same moment wait for each other, so that one of them stays. */
import type { Migration } from './migration.ts';

export const lastEditor: Migration = {
  name: '0006-last-editor',
  // The statement after the lock looks afresh, and so sees what the other one did.
  up: `
    CREATE OR REPLACE FUNCTION keep_an_editor() RETURNS trigger LANGUAGE plpgsql AS $$
    BEGIN
      IF OLD.role = 'editor' AND (TG_OP = 'DELETE' OR NEW.role <> 'editor') THEN
        PERFORM 1 FROM groups WHERE id = OLD.group_id FOR UPDATE;
        IF FOUND AND NOT EXISTS (
          SELECT 1 FROM memberships
          WHERE group_id = OLD.group_id AND role = 'editor' AND person_id <> OLD.person_id
        )
        THEN
          RAISE EXCEPTION 'the last editor of a group cannot leave it'
            USING ERRCODE = 'restrict_violation';
        END IF;
      END IF;
      RETURN CASE TG_OP WHEN 'DELETE' THEN OLD ELSE NEW END;
    END $$;
  `,
  down: `
    CREATE OR REPLACE FUNCTION keep_an_editor() RETURNS trigger LANGUAGE plpgsql AS $$
    BEGIN
      IF OLD.role = 'editor'
        AND (TG_OP = 'DELETE' OR NEW.role <> 'editor')
        AND EXISTS (SELECT 1 FROM groups WHERE id = OLD.group_id)
        AND NOT EXISTS (
          SELECT 1 FROM memberships
          WHERE group_id = OLD.group_id AND role = 'editor' AND person_id <> OLD.person_id
        )
      THEN
        RAISE EXCEPTION 'the last editor of a group cannot leave it' USING ERRCODE = 'restrict_violation';
      END IF;
      RETURN CASE TG_OP WHEN 'DELETE' THEN OLD ELSE NEW END;
    END $$;
  `,
};
