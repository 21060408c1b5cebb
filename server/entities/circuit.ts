import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('circuit')
export class Circuit {
  @PrimaryColumn('uuid') companyId: string
  @PrimaryColumn('uuid') id: string
  @Column('uuid') customerId: string
  @Column('uuid') siteId: string
  @Column('uuid') systemId: string
  @Column('text') name: string
  @Column('text') refrigerant: string
  @Column('text') category: string
  @Column('text') status: string
  @Column('date', { nullable: true }) commissionedOn: string | null
  @Column('integer') version: number
}
