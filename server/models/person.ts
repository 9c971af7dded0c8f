/** People, the identities that others vouch for, and one-time links sent by mail. */
import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';

export class PersonRow extends Model<
  InferAttributes<PersonRow>,
  InferCreationAttributes<PersonRow>
> {
  declare id: CreationOptional<string>;
  declare name: string;
  /** In lower case; null for somebody whose identity provider tells none. */
  declare email: string | null;
  declare emailConfirmedAt: CreationOptional<Date | null>;
  declare passwordHash: CreationOptional<string | null>;
  declare isSiteAdministrator: CreationOptional<boolean>;
}

export function definePerson(sequelize: Sequelize): typeof PersonRow {
  PersonRow.init(
    {
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      name: { type: DataTypes.TEXT, allowNull: false },
      email: { type: DataTypes.TEXT },
      emailConfirmedAt: { type: DataTypes.DATE },
      passwordHash: { type: DataTypes.TEXT },
      isSiteAdministrator: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: false },
    },
    { sequelize, tableName: 'people' },
  );
  return PersonRow;
}

export class IdentityRow extends Model<
  InferAttributes<IdentityRow>,
  InferCreationAttributes<IdentityRow>
> {
  declare provider: string;
  declare subject: string;
  declare personId: string;
  declare person?: NonAttribute<PersonRow>;
}

export function defineIdentity(sequelize: Sequelize): typeof IdentityRow {
  IdentityRow.init(
    {
      provider: { type: DataTypes.TEXT, primaryKey: true },
      subject: { type: DataTypes.TEXT, primaryKey: true },
      personId: { type: DataTypes.UUID, allowNull: false },
    },
    { sequelize, tableName: 'identities', updatedAt: false },
  );
  return IdentityRow;
}

export class EmailTokenRow extends Model<
  InferAttributes<EmailTokenRow>,
  InferCreationAttributes<EmailTokenRow>
> {
  /** SHA-256 of the token; the token itself is in the mail alone. */
  declare tokenHash: string;
  declare personId: string;
  declare purpose: 'reset';
  declare expiresAt: Date;
}

export function defineEmailToken(sequelize: Sequelize): typeof EmailTokenRow {
  EmailTokenRow.init(
    {
      tokenHash: { type: DataTypes.TEXT, primaryKey: true },
      personId: { type: DataTypes.UUID, allowNull: false },
      purpose: { type: DataTypes.TEXT, allowNull: false },
      expiresAt: { type: DataTypes.DATE, allowNull: false },
    },
    { sequelize, tableName: 'email_tokens', updatedAt: false },
  );
  return EmailTokenRow;
}
