import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('system')
export class System {
  @PrimaryColumn('uuid') companyId: string
  @PrimaryColumn('uuid') id: string
  @Column('uuid') customerId: string
  @Column('uuid') siteId: string
  @Column('text') tag: string
  @Column('text') name: string
  @Column('text', { nullable: true }) location: string | null
  @Column('text', { nullable: true }) maker: string | null
  @Column('text', { nullable: true }) model: string | null
  @Column('text', { nullable: true }) serial: string | null
  @Column('text') category: string
  @Column('date', { nullable: true }) installedOn: string | null
  @Column('text', { nullable: true }) subsectorDecision: string | null
  @Column('text', { nullable: true }) subsectorDecidedBy: string | null
  @Column('text', { nullable: true }) subsectorReason: string | null
  @Column('integer') version: number
}
