import { Column, DataType, Model, Table } from 'sequelize-typescript';

/** One concept study. Its revision and ledger head are written only under the row lock of the one path. */
@Table({ tableName: 'studies', underscored: true, timestamps: false })
export class Study extends Model {
  @Column({ type: DataType.UUID, primaryKey: true, defaultValue: DataType.UUIDV4 }) declare id: string;
  @Column(DataType.TEXT) declare key: string;
  @Column(DataType.TEXT) declare name: string;
  /** bigint: the driver hands it over as text. */
  @Column(DataType.BIGINT) declare revision: string;
  @Column(DataType.TEXT) declare ledgerHead: string | null;
  @Column(DataType.JSONB) declare settings: Record<string, unknown>;
  @Column(DataType.INTEGER) declare version: number;
  @Column(DataType.DATE) declare createdAt: Date;
}
