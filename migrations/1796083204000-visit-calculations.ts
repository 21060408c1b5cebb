import type { MigrationInterface, QueryRunner } from 'typeorm'

/** Results of the bench's calculators that belong to a visit. */
export class VisitCalculations1796083204000 implements MigrationInterface {
  name = 'VisitCalculations1796083204000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      create table visit_calculation (
        company_id uuid not null,
        id uuid not null,
        customer_id uuid not null,
        visit_id uuid not null,
        calculator text not null,
        title text not null,
        lines jsonb not null,
        person_id uuid not null,
        recorded_at timestamptz not null default clock_timestamp(),
        primary key (company_id, id),
        foreign key (company_id, visit_id) references visit,
        foreign key (company_id, person_id) references person
      );
      create index visit_calculation_visit on visit_calculation (company_id, visit_id, recorded_at);
      alter table visit_calculation enable row level security;
      create policy own_company on visit_calculation using (company_id = (select app_company()));
      create policy own_customers on visit_calculation as restrictive
        using ((select app_customers()) is null or customer_id = any ((select app_customers())::uuid[]));
      grant select, insert on visit_calculation to weighback_app;
    `)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('drop table visit_calculation')
  }
}
