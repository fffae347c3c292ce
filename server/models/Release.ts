import type { ReleaseContent } from '@shared/schemas/release';
import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import { audited } from './audited';
import * as column from './columns';

/** Signed settings. The database refuses to change or delete a row. */
export class Release extends Model<InferAttributes<Release>, InferCreationAttributes<Release>> {
  declare id: CreationOptional<number>;
  declare labId: number;
  declare studyId: number;
  declare revision: number;
  declare content: ReleaseContent;
  declare contentHash: string;
  declare seal: string;
  declare signedById: number;
  declare createdAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    Release.init(
      {
        id: column.id,
        labId: column.reference,
        studyId: column.reference,
        revision: column.count,
        content: column.json,
        contentHash: column.line(64),
        seal: column.line(64),
        signedById: column.reference,
        createdAt: column.moment,
      },
      { sequelize, tableName: 'releases', updatedAt: false },
    );
    audited(Release, 'release');
  }
}
