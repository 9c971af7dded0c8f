/** The draft of a model, and the texts that lost a race and are kept all the same. */
import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';
import type { PersonRow } from './person.ts';

export class DraftRow extends Model<InferAttributes<DraftRow>, InferCreationAttributes<DraftRow>> {
  declare modelId: string;
  declare source: string;
  /** Counts up with every save. */
  declare revision: number;
  declare updatedById: string;
  declare updatedAt: CreationOptional<Date>;
  declare updatedBy?: NonAttribute<PersonRow>;
}

export function defineDraft(sequelize: Sequelize): typeof DraftRow {
  DraftRow.init(
    {
      modelId: { type: DataTypes.UUID, primaryKey: true },
      source: { type: DataTypes.TEXT, allowNull: false },
      revision: { type: DataTypes.INTEGER, allowNull: false },
      updatedById: { type: DataTypes.UUID, allowNull: false },
      updatedAt: DataTypes.DATE,
    },
    { sequelize, tableName: 'drafts', createdAt: false },
  );
  return DraftRow;
}

export class KeptTextRow extends Model<
  InferAttributes<KeptTextRow>,
  InferCreationAttributes<KeptTextRow>
> {
  declare id: CreationOptional<string>;
  declare modelId: string;
  declare personId: string;
  declare source: string;
  /** The revision that the text was written on. */
  declare basedOn: number;
}

export function defineKeptText(sequelize: Sequelize): typeof KeptTextRow {
  KeptTextRow.init(
    {
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      modelId: { type: DataTypes.UUID, allowNull: false },
      personId: { type: DataTypes.UUID, allowNull: false },
      source: { type: DataTypes.TEXT, allowNull: false },
      basedOn: { type: DataTypes.INTEGER, allowNull: false },
    },
    { sequelize, tableName: 'kept_texts', updatedAt: false },
  );
  return KeptTextRow;
}
