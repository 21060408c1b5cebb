-- The same rows as one charge, by the database alone: a header, two entries, two locked balances, commit.
\set a random(1, 400)
\set b random(401, 800)
begin;
select id from bench_account where id in (:a, :b) order by id for no key update;
with p as (insert into bench_posting (account_a, account_b, mass) values (:a, :b, 0.005) returning id)
insert into bench_entry (posting_id, line, account_id, mass) select p.id, v.line, v.account_id, v.mass from p, (values (1, (:a)::int, -0.005), (2, (:b)::int, 0.005)) as v (line, account_id, mass);
update bench_account set mass = mass - 0.005 where id = :a;
update bench_account set mass = mass + 0.005 where id = :b;
commit;
