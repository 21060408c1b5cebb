import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('partner')
export class Partner {
  @PrimaryColumn('uuid') companyId: string
  @PrimaryColumn('uuid') id: string
  @Column('text') name: string
  @Column('text') kind: string
  @Column('text', { nullable: true }) address: string | null
  @Column('text', { nullable: true }) certificate: string | null
  @Column('integer') version: number
}
