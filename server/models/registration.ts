/** A registration whose link has not been opened yet. */
import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

export class RegistrationRow extends Model<
  InferAttributes<RegistrationRow>,
  InferCreationAttributes<RegistrationRow>
> {
  /** SHA-256 of the token; the token itself is in the mail alone. */
  declare tokenHash: string;
  declare email: string;
  declare name: string;
  declare passwordHash: string;
  declare expiresAt: Date;
  declare createdAt: CreationOptional<Date>;
}

export function defineRegistration(sequelize: Sequelize): typeof RegistrationRow {
  RegistrationRow.init(
    {
      tokenHash: { type: DataTypes.TEXT, primaryKey: true },
      email: { type: DataTypes.TEXT, allowNull: false },
      name: { type: DataTypes.TEXT, allowNull: false },
      passwordHash: { type: DataTypes.TEXT, allowNull: false },
      expiresAt: { type: DataTypes.DATE, allowNull: false },
      createdAt: DataTypes.DATE,
    },
    { sequelize, tableName: 'registrations', updatedAt: false },
  );
  return RegistrationRow;
}
