import type { MigrationInterface, QueryRunner } from 'typeorm'

/** Cylinders, trade partners, accounts and the append-only ledger of mass with its seals. */
export class Ledger1796083202000 implements MigrationInterface {
  name = 'Ledger1796083202000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      create table partner (
        company_id uuid not null references company,
        id uuid not null,
        name text not null,
        kind text not null check (kind in ('supplier', 'reclaimer', 'destroyer')),
        address text,
        certificate text,
        version integer not null default 1,
        primary key (company_id, id)
      );
      create unique index partner_name on partner (company_id, kind, lower(name));

      create table cylinder (
        company_id uuid not null references company,
        id uuid not null,
        number text not null,
        kind text not null check (kind in ('disposable', 'refillable', 'recovery')),
        refrigerant text not null,
        contents text not null check (contents in ('virgin', 'reclaimed', 'recovered', 'mixed')),
        tare_kg numeric(24, 14) not null check (tare_kg >= 0),
        water_capacity_kg numeric(24, 14) check (water_capacity_kg > 0),
        test_due_on date,
        status text not null check (status in ('in-use', 'returned', 'scrapped')),
        holder_id uuid,
        place text,
        owner_customer_id uuid,
        version integer not null default 1,
        primary key (company_id, id),
        foreign key (company_id, holder_id) references person,
        foreign key (company_id, owner_customer_id) references customer
      );
      create unique index cylinder_number on cylinder (company_id, lower(number));
      create index cylinder_sort on cylinder (company_id, number, id);

      -- One row per place where mass can be. Its id is that of the cylinder, circuit or partner.
      create table account (
        company_id uuid not null references company,
        id uuid not null,
        kind text not null check (kind in ('cylinder', 'circuit', 'supplier', 'reclaimer', 'destroyer', 'air', 'variance')),
        customer_id uuid,
        primary key (company_id, id)
      );
      create unique index account_common on account (company_id, kind) where kind in ('air', 'variance');

      -- Kept for cylinders and circuits, which every posting locks anyway; the others are summed when asked for.
      create table balance (
        company_id uuid not null,
        account_id uuid not null,
        refrigerant text not null,
        kind text not null check (kind in ('cylinder', 'circuit')),
        mass_kg numeric(24, 14) not null,
        customer_id uuid,
        primary key (company_id, account_id, refrigerant),
        foreign key (company_id, account_id) references account,
        -- the book of a circuit may fall below nothing by a reversal, until the next complete weigh-in
        constraint cylinder_not_negative check (kind = 'circuit' or mass_kg >= 0)
      );

      create table posting (
        company_id uuid not null,
        id uuid not null,
        kind text not null,
        occurred_on date not null,
        occurred_at timestamptz(3) not null,
        recorded_at timestamptz not null default clock_timestamp(),
        person_id uuid not null,
        refrigerant text not null,
        mass_kg numeric(24, 14) not null,
        entered jsonb,
        cylinder_id uuid,
        to_cylinder_id uuid,
        circuit_id uuid,
        partner_id uuid,
        site_id uuid,
        customer_id uuid,
        visit_id uuid,
        leak_id uuid,
        purpose text,
        is_complete boolean not null,
        part text,
        work_done text,
        note text,
        reverses_id uuid,
        reason text,
        content_hash bytea not null,
        primary key (company_id, id),
        foreign key (company_id, person_id) references person,
        foreign key (company_id, cylinder_id) references cylinder,
        foreign key (company_id, to_cylinder_id) references cylinder,
        foreign key (company_id, circuit_id) references circuit,
        foreign key (company_id, partner_id) references partner,
        foreign key (company_id, visit_id) references visit,
        foreign key (company_id, leak_id) references leak,
        foreign key (company_id, reverses_id) references posting,
        check ((kind = 'reversal') = (reverses_id is not null)),
        check (kind <> 'reversal' or length(reason) > 0)
      );
      create unique index posting_reversed_once on posting (company_id, reverses_id) where reverses_id is not null;
      create index posting_newest on posting (company_id, occurred_at desc, id desc);
      create index posting_circuit on posting (company_id, circuit_id, occurred_at desc, id desc);
      create index posting_cylinder on posting (company_id, cylinder_id, occurred_at desc, id desc);
      create index posting_to_cylinder on posting (company_id, to_cylinder_id) where to_cylinder_id is not null;
      create index posting_site on posting (company_id, site_id, occurred_at desc, id desc);
      create index posting_visit on posting (company_id, visit_id) where visit_id is not null;

      create table entry (
        company_id uuid not null,
        posting_id uuid not null,
        line smallint not null,
        account_id uuid not null,
        refrigerant text not null,
        mass_kg numeric(24, 14) not null check (mass_kg <> 0),
        customer_id uuid,
        primary key (company_id, posting_id, line),
        foreign key (company_id, posting_id) references posting,
        foreign key (company_id, account_id) references account
      );
      create index entry_account on entry (company_id, account_id, refrigerant);

      -- A seal closes a block of committed postings in order; its hash covers the seal before it.
      create table seal (
        company_id uuid not null references company,
        number integer not null,
        previous_hash bytea not null,
        hash bytea not null,
        posting_count integer not null,
        sealed_at timestamptz not null default clock_timestamp(),
        primary key (company_id, number)
      );
      create table sealed_posting (
        company_id uuid not null,
        posting_id uuid not null,
        seal_number integer not null,
        position integer not null,
        primary key (company_id, posting_id),
        foreign key (company_id, seal_number) references seal
      );
      create unique index sealed_posting_order on sealed_posting (company_id, seal_number, position);

      create function refuse_ledger_change() returns trigger language plpgsql as $$
        begin
          raise exception 'The ledger is append-only: correct a posting by a reversal.' using errcode = 'integrity_constraint_violation';
        end $$;
      create function check_posting_balanced() returns trigger language plpgsql as $$
        begin
          if exists (select 1 from entry where company_id = new.company_id and posting_id = new.posting_id
                     group by refrigerant having sum(mass_kg) <> 0) then
            raise exception 'The entries of a posting must sum to zero per refrigerant.' using errcode = 'check_violation', constraint = 'entry_balanced';
          end if;
          return null;
        end $$;
      create constraint trigger entry_balanced after insert on entry deferrable initially deferred
        for each row execute function check_posting_balanced();
    `)
    for (const table of ['posting', 'entry', 'seal', 'sealed_posting'])
      await runner.query(`
        create trigger append_only before update or delete on ${table} for each row execute function refuse_ledger_change();
        create trigger append_only_whole before truncate on ${table} for each statement execute function refuse_ledger_change();
        grant select, insert on ${table} to weighback_app;
      `)
    for (const table of ['account', 'balance', 'posting', 'entry'])
      await runner.query(`
        alter table ${table} enable row level security;
        create policy own_company on ${table} using (company_id = (select app_company()));
        create policy own_customers on ${table} as restrictive
          using ((select app_customers()) is null or customer_id = any ((select app_customers())::uuid[]));
      `)
    for (const table of ['partner', 'cylinder', 'seal', 'sealed_posting'])
      await runner.query(`
        alter table ${table} enable row level security;
        create policy own_company on ${table} using (company_id = (select app_company()));
        create policy staff_only on ${table} as restrictive using ((select app_customers()) is null);
      `)
    await runner.query(`
      grant select, insert, update on partner, cylinder, balance to weighback_app;
      grant select, insert on account to weighback_app;
      -- no column of an account changes; the right to one of them is what lets the application lock a row
      grant update (customer_id) on account to weighback_app;
    `)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`
      drop table sealed_posting;
      drop table seal;
      drop table entry;
      drop table posting;
      drop table balance;
      drop table account;
      drop table cylinder;
      drop table partner;
      drop function check_posting_balanced();
      drop function refuse_ledger_change();
    `)
  }
}
