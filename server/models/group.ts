/** Groups and who belongs to them in which role. */
import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';
import type { Role } from '../../shared/contracts/people.ts';
import type { PersonRow } from './person.ts';

export class GroupRow extends Model<InferAttributes<GroupRow>, InferCreationAttributes<GroupRow>> {
  declare id: CreationOptional<string>;
  declare name: string;
  declare about: string;
}

export function defineGroup(sequelize: Sequelize): typeof GroupRow {
  GroupRow.init(
    {
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      name: { type: DataTypes.TEXT, allowNull: false },
      about: { type: DataTypes.TEXT, allowNull: false },
    },
    { sequelize, tableName: 'groups' },
  );
  return GroupRow;
}

export class MembershipRow extends Model<
  InferAttributes<MembershipRow>,
  InferCreationAttributes<MembershipRow>
> {
  declare groupId: string;
  declare personId: string;
  declare role: Role;
  declare group?: NonAttribute<GroupRow>;
  declare person?: NonAttribute<PersonRow>;
}

export function defineMembership(sequelize: Sequelize): typeof MembershipRow {
  MembershipRow.init(
    {
      groupId: { type: DataTypes.UUID, primaryKey: true },
      personId: { type: DataTypes.UUID, primaryKey: true },
      role: { type: DataTypes.TEXT, allowNull: false },
    },
    { sequelize, tableName: 'memberships' },
  );
  return MembershipRow;
}
