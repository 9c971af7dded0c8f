/** A model: one formulation through all its versions. */
import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';
import type { NotebookRow } from './notebook.ts';

export class ModelRow extends Model<InferAttributes<ModelRow>, InferCreationAttributes<ModelRow>> {
  declare id: CreationOptional<string>;
  declare notebookId: string;
  declare title: string;
  declare createdById: string;
  declare createdAt: CreationOptional<Date>;
  /** Also moved by every saved draft, so that the desk shows what was worked on last. */
  declare updatedAt: CreationOptional<Date>;
  declare notebook?: NonAttribute<NotebookRow>;
}

export function defineModel(sequelize: Sequelize): typeof ModelRow {
  ModelRow.init(
    {
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      notebookId: { type: DataTypes.UUID, allowNull: false },
      title: { type: DataTypes.TEXT, allowNull: false },
      createdById: { type: DataTypes.UUID, allowNull: false },
      createdAt: DataTypes.DATE,
      updatedAt: DataTypes.DATE,
    },
    { sequelize, tableName: 'models' },
  );
  return ModelRow;
}
