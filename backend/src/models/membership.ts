import type { Role } from '@shared/contract';
import { Column, DataType, Model, Table } from 'sequelize-typescript';

/** The roles of one person in one study; no row means that the study does not exist for that person. */
@Table({ tableName: 'memberships', underscored: true, timestamps: false })
export class Membership extends Model {
  @Column({ type: DataType.UUID, primaryKey: true }) declare studyId: string;
  @Column({ type: DataType.UUID, primaryKey: true }) declare personId: string;
  @Column(DataType.ARRAY(DataType.TEXT)) declare roles: Role[];
  @Column(DataType.DATE) declare grantedAt: Date;
}
