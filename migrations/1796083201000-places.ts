import type { MigrationInterface, QueryRunner } from 'typeorm'

/** Customers, sites, systems, circuits and what sits on a circuit. `customer_id` stands on every row so that an owner's policy is one comparison. */
export class Places1796083201000 implements MigrationInterface {
  name = 'Places1796083201000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      create table customer (
        company_id uuid not null references company,
        id uuid not null,
        name text not null,
        contact_name text,
        email text,
        phone text,
        address text,
        note text,
        version integer not null default 1,
        primary key (company_id, id)
      );
      create unique index customer_name on customer (company_id, lower(name));

      create table person_customer (
        company_id uuid not null,
        person_id uuid not null,
        customer_id uuid not null,
        primary key (company_id, person_id, customer_id),
        foreign key (company_id, person_id) references person,
        foreign key (company_id, customer_id) references customer
      );

      create table site (
        company_id uuid not null,
        id uuid not null,
        customer_id uuid not null,
        name text not null,
        street text not null,
        city text not null,
        region text,
        postal_code text,
        country text not null,
        time_zone text not null,
        elevation_m integer not null,
        jurisdiction text not null,
        leak_rate_method text not null check (leak_rate_method in ('annualizing', 'rolling')),
        rule_packs text[] not null,
        version integer not null default 1,
        primary key (company_id, id),
        foreign key (company_id, customer_id) references customer
      );
      create index site_name on site (company_id, name, id);
      create index site_customer on site (company_id, customer_id);

      create table system (
        company_id uuid not null,
        id uuid not null,
        customer_id uuid not null,
        site_id uuid not null,
        tag text not null,
        name text not null,
        location text,
        maker text,
        model text,
        serial text,
        category text not null check (category in ('comfort-cooling', 'commercial', 'industrial-process', 'other')),
        installed_on date,
        subsector_decision text check (subsector_decision in ('excepted', 'not-excepted')),
        subsector_decided_by text,
        subsector_reason text,
        version integer not null default 1,
        primary key (company_id, id),
        foreign key (company_id, customer_id) references customer,
        foreign key (company_id, site_id) references site
      );
      create unique index system_tag on system (company_id, site_id, lower(tag));
      create index system_name on system (company_id, tag, id);

      create table circuit (
        company_id uuid not null,
        id uuid not null,
        customer_id uuid not null,
        site_id uuid not null,
        system_id uuid not null,
        name text not null,
        refrigerant text not null,
        category text not null check (category in ('comfort-cooling', 'commercial', 'industrial-process', 'other')),
        status text not null check (status in ('in-service', 'mothballed', 'retired')),
        commissioned_on date,
        version integer not null default 1,
        primary key (company_id, id),
        foreign key (company_id, customer_id) references customer,
        foreign key (company_id, site_id) references site,
        foreign key (company_id, system_id) references system
      );
      create unique index circuit_name on circuit (company_id, system_id, lower(name));
      create index circuit_site on circuit (company_id, site_id);

      create table full_charge (
        company_id uuid not null,
        id uuid not null,
        customer_id uuid not null,
        circuit_id uuid not null,
        method text not null check (method in ('manufacturer', 'calculated', 'measured', 'range')),
        mass_kg numeric(24, 14) not null check (mass_kg > 0),
        range_low_kg numeric(24, 14),
        range_high_kg numeric(24, 14),
        effective_on date not null,
        note text,
        person_id uuid not null,
        recorded_at timestamptz not null default clock_timestamp(),
        primary key (company_id, id),
        foreign key (company_id, circuit_id) references circuit,
        foreign key (company_id, person_id) references person,
        check (method <> 'range' or (range_low_kg > 0 and range_high_kg >= range_low_kg))
      );
      create index full_charge_circuit on full_charge (company_id, circuit_id, effective_on, recorded_at);

      create table component (
        company_id uuid not null,
        id uuid not null,
        customer_id uuid not null,
        circuit_id uuid not null,
        kind text not null,
        name text not null,
        position text,
        primary key (company_id, id),
        foreign key (company_id, circuit_id) references circuit
      );
      create index component_circuit on component (company_id, circuit_id);

      create table watch_mark (
        company_id uuid not null,
        id uuid not null,
        customer_id uuid not null,
        circuit_id uuid not null,
        component_id uuid,
        text text not null,
        marked_on date not null,
        person_id uuid not null,
        resolved_on date,
        primary key (company_id, id),
        foreign key (company_id, circuit_id) references circuit,
        foreign key (company_id, component_id) references component,
        foreign key (company_id, person_id) references person
      );
      create index watch_mark_circuit on watch_mark (company_id, circuit_id);

      create table leak (
        company_id uuid not null,
        id uuid not null,
        customer_id uuid not null,
        circuit_id uuid not null,
        component_id uuid,
        found_on date not null,
        cause text not null,
        method text not null,
        position text,
        note text,
        person_id uuid not null,
        repaired_on date,
        repair text,
        primary key (company_id, id),
        foreign key (company_id, circuit_id) references circuit,
        foreign key (company_id, component_id) references component,
        foreign key (company_id, person_id) references person
      );
      create index leak_circuit on leak (company_id, circuit_id, found_on);

      create table verification (
        company_id uuid not null,
        id uuid not null,
        customer_id uuid not null,
        circuit_id uuid not null,
        leak_id uuid,
        kind text not null check (kind in ('initial', 'follow-up')),
        tested_on date not null,
        type text not null,
        passed boolean not null,
        shows_all_repaired boolean not null,
        note text,
        person_id uuid not null,
        recorded_at timestamptz not null default clock_timestamp(),
        primary key (company_id, id),
        foreign key (company_id, circuit_id) references circuit,
        foreign key (company_id, leak_id) references leak,
        foreign key (company_id, person_id) references person
      );
      create index verification_circuit on verification (company_id, circuit_id, tested_on);

      create table visit (
        company_id uuid not null,
        id uuid not null,
        customer_id uuid not null,
        site_id uuid not null,
        person_id uuid not null,
        visited_on date not null,
        remark text,
        primary key (company_id, id),
        foreign key (company_id, customer_id) references customer,
        foreign key (company_id, site_id) references site,
        foreign key (company_id, person_id) references person
      );
      create index visit_site on visit (company_id, site_id, visited_on);

      alter table customer enable row level security;
      create policy own_company on customer using (company_id = (select app_company()));
      create policy own_customers on customer as restrictive
        using ((select app_customers()) is null or id = any ((select app_customers())::uuid[]));
      alter table person_customer enable row level security;
      create policy own_company on person_customer using (company_id = (select app_company()));
    `)
    for (const table of ['site', 'system', 'circuit', 'full_charge', 'component', 'watch_mark', 'leak', 'verification', 'visit']) {
      await runner.query(`
        alter table ${table} enable row level security;
        create policy own_company on ${table} using (company_id = (select app_company()));
        create policy own_customers on ${table} as restrictive
          using ((select app_customers()) is null or customer_id = any ((select app_customers())::uuid[]));
      `)
    }
    await runner.query(`
      -- Who stands behind a session at this moment; no row where it has ended or the person is disabled.
      create function find_actor(of_company uuid, of_session uuid)
        returns table (person_id uuid, name text, email text, role text, locale text, customer_ids uuid[])
        language sql stable security definer set search_path = public
        as $$
          select p.id, p.name, p.email, p.role, coalesce(p.preferences ->> 'locale', 'en'),
                 array(select c.customer_id from person_customer c where c.company_id = p.company_id and c.person_id = p.id)
            from person_session s join person p on p.company_id = s.company_id and p.id = s.person_id
           where s.company_id = of_company and s.id = of_session
             and s.ended_at is null and s.expires_at > now() and p.disabled_at is null
        $$;
      grant select, insert, update on customer, site, system, circuit, component, watch_mark, leak, visit to weighback_app;
      grant select, insert on full_charge, verification to weighback_app;
      grant select, insert, delete on person_customer to weighback_app;
    `)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('drop function find_actor(uuid, uuid)')
    for (const table of ['visit', 'verification', 'leak', 'watch_mark', 'component', 'full_charge', 'circuit', 'system', 'site', 'person_customer', 'customer'])
      await runner.query(`drop table ${table}`)
  }
}
