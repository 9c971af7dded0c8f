/** A notebook holds the models of one question. */
import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';
import type { GroupRow } from './group.ts';

export class NotebookRow extends Model<
  InferAttributes<NotebookRow>,
  InferCreationAttributes<NotebookRow>
> {
  declare id: CreationOptional<string>;
  declare groupId: string;
  declare title: string;
  /** Markdown with mathematics. */
  declare introduction: string;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare group?: NonAttribute<GroupRow>;
}

export function defineNotebook(sequelize: Sequelize): typeof NotebookRow {
  NotebookRow.init(
    {
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      groupId: { type: DataTypes.UUID, allowNull: false },
      title: { type: DataTypes.TEXT, allowNull: false },
      introduction: { type: DataTypes.TEXT, allowNull: false },
      createdAt: DataTypes.DATE,
      updatedAt: DataTypes.DATE,
    },
    { sequelize, tableName: 'notebooks' },
  );
  return NotebookRow;
}
