import type { Knex } from 'knex';

/**
 * The call log, in monthly partitions so that retention can drop a month whole. The time of a call is the
 * time in its id, so one call is found by id in one partition. Bodies are json text, not jsonb: they are
 * kept to the letter, and jsonb would refuse escaped NUL characters.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table call (
      id text not null,
      created_at timestamptz not null,
      organization_id uuid not null,
      key_id text,
      member_id uuid,
      calculation text not null,
      status smallint not null,
      problem text,
      units bigint not null check (units >= 0),
      duration_ms double precision not null,
      request_id text not null,
      client_request_id text,
      address inet,
      engine text not null,
      input_digest text,
      result_digest text,
      primary key (created_at, id)
    ) partition by range (created_at);
    create index call_organization on call (organization_id, created_at desc, id desc);
    create index call_key on call (key_id, created_at desc, id desc);

    create table call_body (
      id text not null,
      created_at timestamptz not null,
      request text,
      answer text,
      primary key (created_at, id)
    ) partition by range (created_at);

    create function ensure_call_partitions(p_moment timestamptz) returns void language plpgsql as $$
    declare
      first timestamp := date_trunc('month', p_moment at time zone 'utc');
      suffix text := to_char(first, 'YYYY_MM');
      lower_bound timestamptz := first at time zone 'utc';
      upper_bound timestamptz := (first + interval '1 month') at time zone 'utc';
    begin
      -- Two processes may come here at once; the second waits and then finds the tables made.
      perform pg_advisory_xact_lock(hashtext('ensure_call_partitions'));
      execute format('create table if not exists %I partition of call for values from (%L) to (%L)',
        'call_' || suffix, lower_bound, upper_bound);
      execute format('create table if not exists %I partition of call_body for values from (%L) to (%L)',
        'call_body_' || suffix, lower_bound, upper_bound);
    end $$;

    -- Gives units back, once, in the transaction that records the call that failed.
    create function refund(p_holder text, p_period date, p_units bigint) returns void language sql as $$
      update month_usage set units = greatest(units - p_units, 0)
      where holder = p_holder and period = p_period
    $$;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop function refund(text, date, bigint), ensure_call_partitions(timestamptz);
    drop table call_body, call;
  `);
}
