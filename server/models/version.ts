/** A version: a frozen formulation. The database refuses to change or delete one. */
import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';
import type { DerivationRow } from './derivation.ts';
import type { ModelRow } from './model.ts';
import type { PersonRow } from './person.ts';

export class VersionRow extends Model<
  InferAttributes<VersionRow>,
  InferCreationAttributes<VersionRow>
> {
  declare id: CreationOptional<string>;
  declare modelId: string;
  declare number: number;
  declare source: string;
  declare normalizedSource: string;
  /** SHA-256 of the normalized source; the database computes it again and compares. */
  declare hash: string;
  declare note: string;
  declare frozenById: string;
  declare frozenAt: CreationOptional<Date>;
  declare model?: NonAttribute<ModelRow>;
  declare frozenBy?: NonAttribute<PersonRow>;
  declare derivation?: NonAttribute<DerivationRow>;
}

export function defineVersion(sequelize: Sequelize): typeof VersionRow {
  VersionRow.init(
    {
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      modelId: { type: DataTypes.UUID, allowNull: false },
      number: { type: DataTypes.INTEGER, allowNull: false },
      source: { type: DataTypes.TEXT, allowNull: false },
      normalizedSource: { type: DataTypes.TEXT, allowNull: false },
      hash: { type: DataTypes.TEXT, allowNull: false },
      note: { type: DataTypes.TEXT, allowNull: false },
      frozenById: { type: DataTypes.UUID, allowNull: false },
      frozenAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    },
    { sequelize, tableName: 'versions', timestamps: false },
  );
  return VersionRow;
}
