import { Column, DataType, Model, Table } from 'sequelize-typescript';

/** Somebody who can sign in. Without a password hash the invitation is still open. */
@Table({ tableName: 'people', underscored: true, timestamps: false })
export class Person extends Model {
  @Column({ type: DataType.UUID, primaryKey: true, defaultValue: DataType.UUIDV4 }) declare id: string;
  @Column(DataType.TEXT) declare email: string;
  @Column(DataType.TEXT) declare name: string;
  @Column(DataType.TEXT) declare passwordHash: string | null;
  @Column(DataType.BOOLEAN) declare administrator: boolean;
  @Column(DataType.BOOLEAN) declare disabled: boolean;
  @Column(DataType.BOOLEAN) declare demonstration: boolean;
  @Column(DataType.INTEGER) declare version: number;
  @Column(DataType.DATE) declare createdAt: Date;
}
