import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('visit')
export class Visit {
  @PrimaryColumn('uuid') companyId: string
  @PrimaryColumn('uuid') id: string
  @Column('uuid') customerId: string
  @Column('uuid') siteId: string
  @Column('uuid') personId: string
  @Column('date') visitedOn: string
  @Column('text', { nullable: true }) remark: string | null
}
