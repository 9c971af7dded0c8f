/** The tables as Sequelize models, in the order in which they refer to each other. */
import type { Sequelize } from 'sequelize';
import { defineDerivation } from './derivation.ts';
import { defineDraft, defineKeptText } from './draft.ts';
import { defineEvent } from './event.ts';
import { defineGroup, defineMembership } from './group.ts';
import { defineModel } from './model.ts';
import { defineNotebook } from './notebook.ts';
import { defineEmailToken, defineIdentity, definePerson } from './person.ts';
import { defineRegistration } from './registration.ts';
import { defineVersion } from './version.ts';

export function defineModels(sequelize: Sequelize) {
  const Person = definePerson(sequelize);
  const Identity = defineIdentity(sequelize);
  const EmailToken = defineEmailToken(sequelize);
  const Registration = defineRegistration(sequelize);
  const Group = defineGroup(sequelize);
  const Membership = defineMembership(sequelize);
  const Notebook = defineNotebook(sequelize);
  const Model = defineModel(sequelize);
  const Draft = defineDraft(sequelize);
  const KeptText = defineKeptText(sequelize);
  const Version = defineVersion(sequelize);
  const Derivation = defineDerivation(sequelize);
  const Event = defineEvent(sequelize);

  Identity.belongsTo(Person, { foreignKey: 'personId', as: 'person' });
  Membership.belongsTo(Person, { foreignKey: 'personId', as: 'person' });
  Membership.belongsTo(Group, { foreignKey: 'groupId', as: 'group' });
  Notebook.belongsTo(Group, { foreignKey: 'groupId', as: 'group' });
  Model.belongsTo(Notebook, { foreignKey: 'notebookId', as: 'notebook' });
  Draft.belongsTo(Person, { foreignKey: 'updatedById', as: 'updatedBy' });
  KeptText.belongsTo(Person, { foreignKey: 'personId', as: 'person' });
  Version.belongsTo(Model, { foreignKey: 'modelId', as: 'model' });
  Version.belongsTo(Person, { foreignKey: 'frozenById', as: 'frozenBy' });
  Version.hasOne(Derivation, { foreignKey: 'versionId', as: 'derivation' });
  Derivation.belongsTo(Version, { foreignKey: 'versionId', as: 'version' });
  Event.belongsTo(Person, { foreignKey: 'personId', as: 'person' });
  return {
    Person,
    Identity,
    EmailToken,
    Registration,
    Group,
    Membership,
    Notebook,
    Model,
    Draft,
    KeptText,
    Version,
    Derivation,
    Event,
  };
}

export type Models = ReturnType<typeof defineModels>;
