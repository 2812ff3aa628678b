import { Column, DataType, Model, Table } from 'sequelize-typescript';

export type TokenPurpose = 'invite' | 'reset' | 'first-administrator';

/** A one-time link, kept as the SHA-256 digest of the 32 random bytes that only its recipient has. */
@Table({ tableName: 'tokens', underscored: true, timestamps: false })
export class OneTimeToken extends Model {
  @Column({ type: DataType.TEXT, primaryKey: true }) declare digest: string;
  @Column(DataType.TEXT) declare purpose: TokenPurpose;
  @Column(DataType.UUID) declare personId: string | null;
  @Column(DataType.DATE) declare expiresAt: Date;
  @Column(DataType.DATE) declare usedAt: Date | null;
  @Column(DataType.DATE) declare createdAt: Date;
}
