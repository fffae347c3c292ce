import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

/** One line of the audit trail. The database dates it and refuses to change or delete it. */
export class AuditEvent extends Model<
  InferAttributes<AuditEvent>,
  InferCreationAttributes<AuditEvent>
> {
  declare id: CreationOptional<number>;
  declare labId: number;
  declare at: CreationOptional<Date>;
  declare actorId: number | null;
  declare actorName: string | null;
  declare actorRoles: string | null;
  declare noun: string;
  declare nounId: number | null;
  declare studyId: number | null;
  declare action: string;
  declare before: Record<string, unknown> | null;
  declare after: Record<string, unknown> | null;
  declare why: string | null;
  declare requestId: string;

  static define(sequelize: Sequelize): void {
    AuditEvent.init(
      {
        id: { type: DataTypes.BIGINT.UNSIGNED, primaryKey: true, autoIncrement: true },
        labId: { type: DataTypes.BIGINT.UNSIGNED, allowNull: false },
        at: { type: DataTypes.DATE(3), allowNull: false, defaultValue: DataTypes.NOW },
        actorId: DataTypes.BIGINT.UNSIGNED,
        actorName: DataTypes.STRING(120),
        actorRoles: DataTypes.STRING(120),
        noun: { type: DataTypes.STRING(40), allowNull: false },
        nounId: DataTypes.BIGINT.UNSIGNED,
        studyId: DataTypes.BIGINT.UNSIGNED,
        action: { type: DataTypes.STRING(40), allowNull: false },
        before: { type: DataTypes.JSON, field: 'before_json' },
        after: { type: DataTypes.JSON, field: 'after_json' },
        why: DataTypes.TEXT,
        requestId: { type: DataTypes.CHAR(36), allowNull: false },
      },
      { sequelize, tableName: 'audit_events', timestamps: false },
    );
  }
}
