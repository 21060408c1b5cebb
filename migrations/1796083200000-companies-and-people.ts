import type { MigrationInterface, QueryRunner } from 'typeorm'

/** Companies, people, their sessions and invitations; the functions and policies that keep companies apart. */
export class CompaniesAndPeople1796083200000 implements MigrationInterface {
  name = 'CompaniesAndPeople1796083200000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      create function app_company() returns uuid language sql stable parallel safe
        as $$ select nullif(current_setting('app.company_id', true), '')::uuid $$;
      -- null: the company's own people, who see all customers; a list: an owner's customers
      create function app_customers() returns uuid[] language sql stable parallel safe
        as $$ select nullif(current_setting('app.customer_ids', true), '')::uuid[] $$;

      create table company (
        id uuid primary key,
        name text not null,
        is_demo boolean not null default false,
        mass_unit text not null default 'lb-oz',
        created_at timestamptz not null default now()
      );
      alter table company enable row level security;
      create policy own_company on company using (id = (select app_company()));

      create table person (
        company_id uuid not null references company,
        id uuid not null,
        email text not null,
        name text not null,
        role text not null check (role in ('technician', 'officer', 'owner', 'auditor', 'administrator')),
        password_hash text,
        certificate_number text,
        certificate_type text,
        preferences jsonb not null,
        disabled_at timestamptz,
        version integer not null default 1,
        created_at timestamptz not null default now(),
        primary key (company_id, id)
      );
      -- across companies on purpose: the address alone must lead to one account at sign-in
      create unique index person_email on person (lower(email));
      create index person_name on person (company_id, name, id);
      alter table person enable row level security;
      create policy own_company on person using (company_id = (select app_company()));

      create table person_session (
        company_id uuid not null,
        id uuid not null,
        person_id uuid not null,
        refresh_hash bytea not null,
        previous_hash bytea,
        user_agent text not null,
        started_at timestamptz not null default now(),
        last_used_at timestamptz not null default now(),
        expires_at timestamptz not null,
        ended_at timestamptz,
        primary key (company_id, id),
        foreign key (company_id, person_id) references person
      );
      create index person_session_person on person_session (company_id, person_id);
      alter table person_session enable row level security;
      create policy own_company on person_session using (company_id = (select app_company()));

      create table person_link (
        company_id uuid not null,
        id uuid not null,
        person_id uuid not null,
        purpose text not null check (purpose in ('invitation', 'reset')),
        token_hash bytea not null,
        expires_at timestamptz not null,
        used_at timestamptz,
        primary key (company_id, id),
        foreign key (company_id, person_id) references person
      );
      alter table person_link enable row level security;
      create policy own_company on person_link using (company_id = (select app_company()));

      -- Before a company is known, only this much may be asked. Runs as the owner of the tables.
      create function find_account(address text) returns table (company_id uuid, person_id uuid)
        language sql stable security definer set search_path = public
        as $$ select p.company_id, p.id from person p where lower(p.email) = lower(address) $$;
      create function all_companies() returns setof uuid
        language sql stable security definer set search_path = public
        as $$ select id from company $$;
      create function create_company(new_id uuid, new_name text, demo boolean) returns void
        language sql security definer set search_path = public
        as $$ insert into company (id, name, is_demo) values (new_id, new_name, demo) on conflict do nothing $$;

      grant select, update on company to weighback_app;
      grant select, insert, update on person, person_session, person_link to weighback_app;
    `)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`
      drop function create_company(uuid, text, boolean);
      drop function all_companies();
      drop function find_account(text);
      drop table person_link;
      drop table person_session;
      drop table person;
      drop table company;
      drop function app_customers();
      drop function app_company();
    `)
  }
}
