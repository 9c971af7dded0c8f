/** Groups with their members, notebooks, models and drafts. */
import type { Migration } from './migration.ts';

export const notebooks: Migration = {
  name: '0002-notebooks',
  up: `
    CREATE TABLE groups (
      id uuid PRIMARY KEY,
      name text NOT NULL CHECK (length(name) BETWEEN 1 AND 200),
      about text NOT NULL,
      created_at timestamptz NOT NULL,
      updated_at timestamptz NOT NULL
    );
    CREATE TABLE memberships (
      group_id uuid NOT NULL REFERENCES groups ON DELETE CASCADE,
      person_id uuid NOT NULL REFERENCES people ON DELETE CASCADE,
      role text NOT NULL CHECK (role IN ('reader', 'modeler', 'referee', 'editor')),
      created_at timestamptz NOT NULL,
      updated_at timestamptz NOT NULL,
      PRIMARY KEY (group_id, person_id)
    );
    CREATE INDEX memberships_person ON memberships (person_id);

    -- A group without an editor could not be governed any more.
    CREATE FUNCTION keep_an_editor() RETURNS trigger LANGUAGE plpgsql AS $$
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
    CREATE TRIGGER keep_an_editor BEFORE UPDATE OR DELETE ON memberships
      FOR EACH ROW EXECUTE FUNCTION keep_an_editor();

    CREATE TABLE notebooks (
      id uuid PRIMARY KEY,
      group_id uuid NOT NULL REFERENCES groups ON DELETE CASCADE,
      title text NOT NULL CHECK (length(title) BETWEEN 1 AND 200),
      introduction text NOT NULL,
      created_at timestamptz NOT NULL,
      updated_at timestamptz NOT NULL
    );
    CREATE INDEX notebooks_group ON notebooks (group_id, title, id);
    CREATE TABLE models (
      id uuid PRIMARY KEY,
      notebook_id uuid NOT NULL REFERENCES notebooks ON DELETE CASCADE,
      title text NOT NULL CHECK (length(title) BETWEEN 1 AND 200),
      created_by_id uuid NOT NULL REFERENCES people,
      created_at timestamptz NOT NULL,
      updated_at timestamptz NOT NULL
    );
    CREATE INDEX models_notebook ON models (notebook_id, updated_at DESC, id);
    CREATE TABLE drafts (
      model_id uuid PRIMARY KEY REFERENCES models ON DELETE CASCADE,
      source text NOT NULL CHECK (octet_length(source) <= 65536),
      revision integer NOT NULL CHECK (revision >= 0),
      updated_by_id uuid NOT NULL REFERENCES people,
      updated_at timestamptz NOT NULL
    );
    CREATE TABLE kept_texts (
      id uuid PRIMARY KEY,
      model_id uuid NOT NULL REFERENCES models ON DELETE CASCADE,
      person_id uuid NOT NULL REFERENCES people,
      source text NOT NULL CHECK (octet_length(source) <= 65536),
      based_on integer NOT NULL,
      created_at timestamptz NOT NULL
    );
    CREATE INDEX kept_texts_model ON kept_texts (model_id, created_at DESC);
  `,
  down: `
    DROP TABLE kept_texts;
    DROP TABLE drafts;
    DROP TABLE models;
    DROP TABLE notebooks;
    DROP TABLE memberships;
    DROP FUNCTION keep_an_editor();
    DROP TABLE groups;
  `,
};
