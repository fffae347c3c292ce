import type { ResponseJson } from '@shared/schemas/response';
import type { BriefInput, StudyFactor } from '@shared/schemas/study';
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
import { Person } from './Person';
import { RigEnvelope } from './RigEnvelope';
import { Sample } from './Sample';
import { SieveStack } from './SieveStack';

/** A question put to a sample. The columns from `factors` on are its Brief, null until it is saved. */
export class Study extends Model<InferAttributes<Study>, InferCreationAttributes<Study>> {
  declare id: CreationOptional<number>;
  declare labId: number;
  declare code: string;
  declare title: string;
  declare question: CreationOptional<string>;
  declare sampleId: number;
  declare rigEnvelopeId: number | null;
  declare sieveStackId: number | null;
  declare factors: StudyFactor[] | null;
  declare fixed: BriefInput['fixed'] | null;
  declare responses: ResponseJson[] | null;
  declare batchMassG: number | null;
  declare handlingMinutes: number | null;
  declare massLimitG: number | null;
  declare runLimit: number | null;
  declare dayLimit: number | null;
  declare effectThatMatters: number | null;
  declare expectedSpread: number | null;
  declare practiceMaterial: BriefInput['practiceMaterial'];
  declare isSimulated: CreationOptional<boolean>;
  declare openedById: number;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare sample?: NonAttribute<Sample>;
  declare rigEnvelope?: NonAttribute<RigEnvelope>;
  declare sieveStack?: NonAttribute<SieveStack>;
  declare openedBy?: NonAttribute<Person>;

  static define(sequelize: Sequelize): void {
    Study.init(
      {
        id: column.id,
        labId: column.reference,
        code: column.line(20),
        title: column.line(120),
        question: column.text,
        sampleId: column.reference,
        rigEnvelopeId: column.optionalReference,
        sieveStackId: column.optionalReference,
        factors: column.optionalJson,
        fixed: column.optionalJson,
        responses: column.optionalJson,
        batchMassG: column.optionalDouble,
        handlingMinutes: column.optionalDouble,
        massLimitG: column.optionalDouble,
        runLimit: column.optionalCount,
        dayLimit: column.optionalCount,
        effectThatMatters: column.optionalDouble,
        expectedSpread: column.optionalDouble,
        practiceMaterial: { ...column.line(20), allowNull: true },
        isSimulated: column.flag,
        openedById: column.reference,
        version: column.version,
        ...column.stamps,
      },
      { sequelize, tableName: 'studies', version: true },
    );
    audited(Study, 'study');
  }

  static associate(): void {
    Study.belongsTo(Sample, { as: 'sample', foreignKey: 'sampleId' });
    Study.belongsTo(RigEnvelope, { as: 'rigEnvelope', foreignKey: 'rigEnvelopeId' });
    Study.belongsTo(SieveStack, { as: 'sieveStack', foreignKey: 'sieveStackId' });
    Study.belongsTo(Person, { as: 'openedBy', foreignKey: 'openedById' });
  }
}
