import { Column, DataType, Model, Table } from 'sequelize-typescript';

/*
 * Rows of the entities of a study. What is referred to, unique or asked for by queries has a column of its own; the
 * rest of an entity is its body. Which field is which is said once, in study/entity-rows.ts.
 */

const options = { underscored: true, timestamps: false } as const;

@Table({ ...options, tableName: 'policies' })
export class PolicyRow extends Model {
  @Column({ type: DataType.UUID, primaryKey: true }) declare studyId: string;
  @Column({ type: DataType.UUID, primaryKey: true }) declare id: string;
  @Column(DataType.INTEGER) declare version: number;
  @Column(DataType.TEXT) declare parameter: string;
  @Column(DataType.TEXT) declare maturity: string;
  @Column(DataType.JSONB) declare body: object;
}

@Table({ ...options, tableName: 'elements' })
export class ElementRow extends Model {
  @Column({ type: DataType.UUID, primaryKey: true }) declare studyId: string;
  @Column({ type: DataType.UUID, primaryKey: true }) declare id: string;
  @Column(DataType.INTEGER) declare version: number;
  @Column(DataType.TEXT) declare key: string;
  @Column(DataType.UUID) declare parentId: string | null;
  @Column(DataType.JSONB) declare body: object;
}

@Table({ ...options, tableName: 'requirements' })
export class RequirementRow extends Model {
  @Column({ type: DataType.UUID, primaryKey: true }) declare studyId: string;
  @Column({ type: DataType.UUID, primaryKey: true }) declare id: string;
  @Column(DataType.INTEGER) declare version: number;
  @Column(DataType.TEXT) declare key: string;
  @Column(DataType.TEXT) declare state: string;
  @Column(DataType.UUID) declare elementId: string | null;
  @Column(DataType.UUID) declare ownerId: string;
  @Column(DataType.JSONB) declare body: object;
}

@Table({ ...options, tableName: 'traces' })
export class TraceRow extends Model {
  @Column({ type: DataType.UUID, primaryKey: true }) declare studyId: string;
  @Column({ type: DataType.UUID, primaryKey: true }) declare id: string;
  @Column(DataType.INTEGER) declare version: number;
  @Column(DataType.UUID) declare parentId: string;
  @Column(DataType.UUID) declare childId: string;
  @Column(DataType.TEXT) declare share: string;
  @Column(DataType.JSONB) declare body: object;
}

@Table({ ...options, tableName: 'quantities' })
export class QuantityRow extends Model {
  @Column({ type: DataType.UUID, primaryKey: true }) declare studyId: string;
  @Column({ type: DataType.UUID, primaryKey: true }) declare id: string;
  @Column(DataType.INTEGER) declare version: number;
  @Column(DataType.TEXT) declare key: string;
  @Column(DataType.TEXT) declare state: string;
  @Column(DataType.UUID) declare elementId: string | null;
  @Column(DataType.UUID) declare ownerId: string;
  @Column(DataType.DOUBLE) declare si: number | null;
  @Column(DataType.JSONB) declare body: object;
}

@Table({ ...options, tableName: 'analyses' })
export class AnalysisRow extends Model {
  @Column({ type: DataType.UUID, primaryKey: true }) declare studyId: string;
  @Column({ type: DataType.UUID, primaryKey: true }) declare id: string;
  @Column(DataType.INTEGER) declare version: number;
  @Column(DataType.TEXT) declare key: string;
  @Column(DataType.TEXT) declare kind: string;
  @Column(DataType.UUID) declare elementId: string | null;
  @Column(DataType.UUID) declare authorId: string;
  @Column(DataType.JSONB) declare body: object;
}

/** What one input of an analysis is bound to. */
@Table({ ...options, tableName: 'bindings' })
export class BindingRow extends Model {
  @Column({ type: DataType.UUID, primaryKey: true }) declare studyId: string;
  @Column({ type: DataType.UUID, primaryKey: true }) declare analysisId: string;
  @Column({ type: DataType.INTEGER, primaryKey: true }) declare position: number;
  @Column(DataType.TEXT) declare name: string;
  @Column(DataType.UUID) declare quantityId: string | null;
  @Column(DataType.UUID) declare sourceAnalysisId: string | null;
  @Column(DataType.TEXT) declare sourceOutput: string | null;
  @Column(DataType.TEXT) declare constant: string | null;
}

@Table({ ...options, tableName: 'verifications' })
export class VerificationRow extends Model {
  @Column({ type: DataType.UUID, primaryKey: true }) declare studyId: string;
  @Column({ type: DataType.UUID, primaryKey: true }) declare id: string;
  @Column(DataType.INTEGER) declare version: number;
  @Column(DataType.UUID) declare requirementId: string;
  @Column(DataType.UUID) declare analysisId: string | null;
  @Column(DataType.TEXT) declare output: string | null;
  @Column(DataType.JSONB) declare body: object;
}

@Table({ ...options, tableName: 'assessments' })
export class AssessmentRow extends Model {
  @Column({ type: DataType.UUID, primaryKey: true }) declare studyId: string;
  @Column({ type: DataType.UUID, primaryKey: true }) declare id: string;
  @Column(DataType.INTEGER) declare version: number;
  @Column(DataType.UUID) declare requirementId: string;
  @Column(DataType.JSONB) declare body: object;
}

@Table({ ...options, tableName: 'departures' })
export class DepartureRow extends Model {
  @Column({ type: DataType.UUID, primaryKey: true }) declare studyId: string;
  @Column({ type: DataType.UUID, primaryKey: true }) declare id: string;
  @Column(DataType.INTEGER) declare version: number;
  @Column(DataType.TEXT) declare key: string;
  @Column(DataType.UUID) declare requirementId: string;
  @Column(DataType.TEXT) declare state: string;
  @Column(DataType.DATEONLY) declare expires: string | null;
  @Column(DataType.JSONB) declare body: object;
}

@Table({ ...options, tableName: 'change_requests' })
export class ChangeRequestRow extends Model {
  @Column({ type: DataType.UUID, primaryKey: true }) declare studyId: string;
  @Column({ type: DataType.UUID, primaryKey: true }) declare id: string;
  @Column(DataType.INTEGER) declare version: number;
  @Column(DataType.TEXT) declare key: string;
  @Column(DataType.TEXT) declare state: string;
  @Column(DataType.UUID) declare authorId: string;
  @Column(DataType.JSONB) declare body: object;
}

@Table({ ...options, tableName: 'baselines' })
export class BaselineRow extends Model {
  @Column({ type: DataType.UUID, primaryKey: true }) declare studyId: string;
  @Column({ type: DataType.UUID, primaryKey: true }) declare id: string;
  @Column(DataType.INTEGER) declare version: number;
  @Column(DataType.TEXT) declare key: string;
  @Column(DataType.BIGINT) declare takenAtRevision: number;
  @Column(DataType.TEXT) declare digest: string;
  @Column(DataType.JSONB) declare body: object;
}

export const studyRowModels = [
  PolicyRow,
  ElementRow,
  RequirementRow,
  TraceRow,
  QuantityRow,
  AnalysisRow,
  BindingRow,
  VerificationRow,
  AssessmentRow,
  DepartureRow,
  ChangeRequestRow,
  BaselineRow,
];
