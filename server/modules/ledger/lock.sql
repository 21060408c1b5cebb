-- Locks the accounts of a posting in the order of their ids, so that two postings cannot deadlock.
-- $1 company, $2 accounts
select id from account where company_id = $1 and id = any ($2::uuid[]) order by id for no key update
