/** The draft of a model, and every text that it has held or that lost a race. */
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
  /** The revision that it became; null for one that lost a race. */
  declare revision: number | null;
  declare createdAt: CreationOptional<Date>;
  declare person?: NonAttribute<PersonRow>;
}

export function defineKeptText(sequelize: Sequelize): typeof KeptTextRow {
  KeptTextRow.init(
    {
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      modelId: { type: DataTypes.UUID, allowNull: false },
      personId: { type: DataTypes.UUID, allowNull: false },
      source: { type: DataTypes.TEXT, allowNull: false },
      basedOn: { type: DataTypes.INTEGER, allowNull: false },
      revision: { type: DataTypes.INTEGER },
      createdAt: DataTypes.DATE,
    },
    { sequelize, tableName: 'kept_texts', updatedAt: false },
  );
  return KeptTextRow;
}
