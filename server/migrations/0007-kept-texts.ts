/**
 * Every text that a draft has held is kept, with its revision; so is one that lost a race, without
 * one. The same text of the same person on the same revision is kept once.
 */
import type { Migration } from './migration.ts';

export const keptTexts: Migration = {
  name: '0007-kept-texts',
  up: `
    DELETE FROM kept_texts a USING kept_texts b
      WHERE a.ctid < b.ctid AND a.model_id = b.model_id AND a.person_id = b.person_id
        AND a.based_on = b.based_on AND a.source = b.source;
    ALTER TABLE kept_texts ADD COLUMN revision integer CHECK (revision >= 0);
    INSERT INTO kept_texts (id, model_id, person_id, source, based_on, created_at, revision)
      SELECT gen_random_uuid(), model_id, updated_by_id, source, revision, updated_at, revision
      FROM drafts;
    CREATE UNIQUE INDEX kept_texts_revision ON kept_texts (model_id, revision);
    CREATE UNIQUE INDEX kept_texts_lost
      ON kept_texts (model_id, person_id, based_on, md5(source)) WHERE revision IS NULL;
    DROP INDEX kept_texts_model;
    CREATE INDEX kept_texts_model ON kept_texts (model_id, created_at DESC, id DESC);
  `,
  down: `
    DELETE FROM kept_texts WHERE revision IS NOT NULL;
    DROP INDEX kept_texts_model;
    DROP INDEX kept_texts_lost;
    DROP INDEX kept_texts_revision;
    ALTER TABLE kept_texts DROP COLUMN revision;
    CREATE INDEX kept_texts_model ON kept_texts (model_id, created_at DESC);
  `,
};
