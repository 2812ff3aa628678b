import { Column, DataType, Model, Table } from 'sequelize-typescript';

/** One line of what happened to people and their rights; only ever added. */
@Table({ tableName: 'people_audit', underscored: true, timestamps: false })
export class PeopleAuditLine extends Model {
  @Column({ type: DataType.BIGINT, primaryKey: true, autoIncrement: true }) declare id: string;
  @Column(DataType.DATE) declare at: Date;
  @Column(DataType.UUID) declare actorId: string | null;
  @Column(DataType.UUID) declare subjectId: string | null;
  @Column(DataType.UUID) declare studyId: string | null;
  @Column(DataType.TEXT) declare action: string;
  @Column(DataType.JSONB) declare detail: Record<string, unknown>;
}
