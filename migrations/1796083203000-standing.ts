import type { MigrationInterface, QueryRunner } from 'typeorm'

/** What is computed from the ledger and kept for lists: the rate of each addition and where each circuit stands. */
export class Standing1796083203000 implements MigrationInterface {
  name = 'Standing1796083203000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      create table addition_rate (
        company_id uuid not null,
        posting_id uuid not null,
        circuit_id uuid not null,
        customer_id uuid not null,
        occurred_on date not null,
        position integer not null,
        mass_kg numeric(24, 14) not null,
        counted_kg numeric(24, 14) not null,
        added_kg numeric(24, 14) not null,
        days integer,
        full_charge_kg numeric(24, 14),
        rate_percent numeric(30, 12),
        threshold_percent numeric(9, 4),
        is_above boolean not null,
        exempt text,
        basis text[] not null,
        leak_id uuid,
        primary key (company_id, posting_id),
        foreign key (company_id, posting_id) references posting,
        foreign key (company_id, circuit_id) references circuit
      );
      create index addition_rate_circuit on addition_rate (company_id, circuit_id, position);

      create table circuit_standing (
        company_id uuid not null,
        circuit_id uuid not null,
        customer_id uuid not null,
        site_id uuid not null,
        standing text not null check (standing in ('over', 'flat', 'near', 'far', 'none')),
        rate_percent numeric(30, 12),
        rated_on date,
        threshold_percent numeric(9, 4),
        -- sort keys are integers: comparing numeric is not leakproof and cannot bound an index scan behind row security
        severity integer not null,
        rate_ten_thousandths bigint not null,
        primary key (company_id, circuit_id),
        foreign key (company_id, circuit_id) references circuit
      );
      create index circuit_standing_severity on circuit_standing (company_id, severity desc, circuit_id desc);
      create index circuit_standing_rate on circuit_standing (company_id, rate_ten_thousandths desc, circuit_id desc);
      create index circuit_standing_site on circuit_standing (company_id, site_id);

      -- The trail: who changed what that is not a posting, with the values before and after.
      create table trail (
        company_id uuid not null references company,
        id uuid not null,
        at timestamptz not null default clock_timestamp(),
        person_id uuid,
        action text not null,
        subject text not null,
        subject_id uuid not null,
        subject_name text not null,
        before jsonb,
        after jsonb,
        primary key (company_id, id)
      );
      create index trail_newest on trail (company_id, at desc, id desc);
      create index trail_subject on trail (company_id, subject, subject_id, at desc);
      alter table trail enable row level security;
      create policy own_company on trail using (company_id = (select app_company()));
      create policy staff_reads on trail as restrictive for select using ((select app_customers()) is null);
      create trigger append_only before update or delete on trail for each row execute function refuse_ledger_change();
      create trigger append_only_whole before truncate on trail for each statement execute function refuse_ledger_change();
      grant select, insert on trail to weighback_app;
    `)
    for (const table of ['addition_rate', 'circuit_standing'])
      await runner.query(`
        alter table ${table} enable row level security;
        create policy own_company on ${table} using (company_id = (select app_company()));
        create policy own_customers on ${table} as restrictive
          using ((select app_customers()) is null or customer_id = any ((select app_customers())::uuid[]));
        grant select, insert, update, delete on ${table} to weighback_app;
      `)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`drop table trail; drop table circuit_standing; drop table addition_rate;`)
  }
}
