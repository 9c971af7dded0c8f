/** The record of what happened in a group. */
import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';
import type { RecordedEvent } from '../../shared/contracts/models.ts';
import type { PersonRow } from './person.ts';

export class EventRow extends Model<InferAttributes<EventRow>, InferCreationAttributes<EventRow>> {
  declare id: CreationOptional<string>;
  declare groupId: string;
  declare personId: string | null;
  declare kind: RecordedEvent['kind'];
  declare modelId: string | null;
  declare title: string;
  declare versionNumber: number | null;
  declare at: CreationOptional<Date>;
  declare person?: NonAttribute<PersonRow>;
}

export function defineEvent(sequelize: Sequelize): typeof EventRow {
  EventRow.init(
    {
      id: { type: DataTypes.BIGINT, primaryKey: true, autoIncrement: true },
      groupId: { type: DataTypes.UUID, allowNull: false },
      personId: { type: DataTypes.UUID },
      kind: { type: DataTypes.TEXT, allowNull: false },
      modelId: { type: DataTypes.UUID },
      title: { type: DataTypes.TEXT, allowNull: false },
      versionNumber: { type: DataTypes.INTEGER },
      at: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    },
    { sequelize, tableName: 'events', timestamps: false },
  );
  return EventRow;
}
