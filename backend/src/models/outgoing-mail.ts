import { Column, DataType, Model, Table } from 'sequelize-typescript';

/** One mail of the outbox, to exactly one address. Its body is emptied once it is sent, because it may hold a one-time link. */
@Table({ tableName: 'mails', underscored: true, timestamps: false })
export class OutgoingMail extends Model {
  @Column({ type: DataType.UUID, primaryKey: true, defaultValue: DataType.UUIDV4 }) declare id: string;
  @Column(DataType.TEXT) declare recipient: string;
  @Column(DataType.TEXT) declare subject: string;
  @Column(DataType.TEXT) declare body: string | null;
  @Column(DataType.TEXT) declare status: 'queued' | 'sent' | 'failed';
  @Column(DataType.INTEGER) declare attempts: number;
  @Column(DataType.DATE) declare nextAttemptAt: Date;
  @Column(DataType.TEXT) declare lastError: string | null;
  @Column(DataType.DATE) declare createdAt: Date;
  @Column(DataType.DATE) declare sentAt: Date | null;
}
