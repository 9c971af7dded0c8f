/** What the worker makes of a version: how far it is, and the result once complete. */
import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';
import type { CheckStatus } from '../../shared/contracts/derivation.ts';
import type { DerivationState } from '../../shared/contracts/models.ts';
import type { VersionRow } from './version.ts';

export class DerivationRow extends Model<
  InferAttributes<DerivationRow>,
  InferCreationAttributes<DerivationRow>
> {
  declare id: CreationOptional<string>;
  declare versionId: string;
  declare state: CreationOptional<DerivationState>;
  declare progress: CreationOptional<number>;
  declare stage: CreationOptional<string>;
  declare fault: CreationOptional<string | null>;
  /** The derivation as JSON, byte for byte as it was made. */
  declare result: CreationOptional<string | null>;
  /** SHA-256 of result, a line feed and verification; the database computes it again. */
  declare resultHash: CreationOptional<string | null>;
  declare verification: CreationOptional<string | null>;
  declare verificationStatus: CreationOptional<CheckStatus | null>;
  /** What derived the result: it may come out otherwise by another engine. */
  declare engine: CreationOptional<string | null>;
  /** How often this round was begun. */
  declare attempts: CreationOptional<number>;
  /** Counts the times that the derivation was put into the queue. */
  declare round: CreationOptional<number>;
  declare cancelRequested: CreationOptional<boolean>;
  declare updatedAt: CreationOptional<Date>;
  declare version?: NonAttribute<VersionRow>;
}

export function defineDerivation(sequelize: Sequelize): typeof DerivationRow {
  DerivationRow.init(
    {
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      versionId: { type: DataTypes.UUID, allowNull: false },
      state: { type: DataTypes.TEXT, allowNull: false, defaultValue: 'queued' },
      progress: { type: DataTypes.DOUBLE, allowNull: false, defaultValue: 0 },
      stage: { type: DataTypes.TEXT, allowNull: false, defaultValue: 'waiting for a worker' },
      fault: { type: DataTypes.TEXT },
      result: { type: DataTypes.TEXT },
      resultHash: { type: DataTypes.TEXT },
      verification: { type: DataTypes.TEXT },
      verificationStatus: { type: DataTypes.TEXT },
      engine: { type: DataTypes.TEXT },
      attempts: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
      round: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 },
      cancelRequested: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: false },
      updatedAt: DataTypes.DATE,
    },
    { sequelize, tableName: 'derivations', createdAt: false },
  );
  return DerivationRow;
}
