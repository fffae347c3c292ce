import type { EnvelopeJson } from '@shared/schemas/rig';
import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';
import { audited } from './audited';
import * as column from './columns';
import { Rig } from './Rig';

/** One revision of what a rig can do. Written once; studies keep theirs. */
export class RigEnvelope extends Model<
  InferAttributes<RigEnvelope>,
  InferCreationAttributes<RigEnvelope>
> {
  declare id: CreationOptional<number>;
  declare labId: number;
  declare rigId: number;
  declare revision: number;
  declare envelope: EnvelopeJson;
  declare createdAt: CreationOptional<Date>;
  declare rig?: NonAttribute<Rig>;

  static define(sequelize: Sequelize): void {
    RigEnvelope.init(
      {
        id: column.id,
        labId: column.reference,
        rigId: column.reference,
        revision: column.count,
        envelope: column.json,
        createdAt: column.moment,
      },
      { sequelize, tableName: 'rig_envelopes', updatedAt: false },
    );
    audited(RigEnvelope, 'rig envelope');
  }

  static associate(): void {
    RigEnvelope.belongsTo(Rig, { as: 'rig', foreignKey: 'rigId' });
  }
}
