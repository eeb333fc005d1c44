import type { Knex } from 'knex';

/**
 * Admission: who calls, may they, and is there quota, in one function and so in one round trip. The order
 * of the checks is the order of precedence of the answers. Rows of month_usage are always locked in the
 * order key or member, then organization, here and in the refund, so two transactions cannot deadlock.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table month_usage (
      holder text not null,
      period date not null,
      units bigint not null check (units >= 0),
      primary key (holder, period)
    ) with (fillfactor = 70);
    comment on column month_usage.holder is 'key:<id>, member:<id> or organization:<id>';

    -- Unlogged: a crash forgets a minute of bursts, which harms nobody.
    create unlogged table burst_bucket (
      holder text primary key,
      empty_at timestamptz not null
    ) with (fillfactor = 70);

    -- The limiter package's own table, made here so that it never has to create one at run time.
    create unlogged table sign_in_attempt (
      key varchar(255) primary key,
      points integer not null default 0,
      expire bigint
    );

    create function current_period() returns date language sql stable as
      $$ select date_trunc('month', now() at time zone 'utc')::date $$;

    create function charge(p_holder text, p_units bigint, p_quota bigint) returns bigint language sql as $$
      insert into month_usage as u (holder, period, units)
      select p_holder, current_period(), p_units where p_units <= p_quota
      on conflict (holder, period) do update set units = u.units + excluded.units
      where u.units + excluded.units <= p_quota
      returning u.units
    $$;

    create function used(p_holder text) returns bigint language sql stable as $$
      select coalesce((select units from month_usage where holder = p_holder and period = current_period()), 0)
    $$;

    create type admission as (
      verdict text,
      organization_id uuid,
      key_id text,
      member_id uuid,
      session_expires_at timestamptz,
      role text,
      keeps_bodies boolean,
      burst_limit integer,
      burst_remaining integer,
      burst_seconds double precision,
      holder_quota bigint,
      holder_used bigint,
      organization_quota bigint,
      organization_used bigint,
      period text,
      period_seconds integer,
      period_remaining double precision
    );

    create function admit(
      p_digest bytea, p_session uuid, p_scope text, p_roles text[], p_address inet, p_units bigint
    ) returns admission language plpgsql as $$
    declare
      a admission;
      k api_key;
      o organization;
      m member;
      s session;
      own_holder text;
      moment timestamptz := clock_timestamp();
      step interval;
      debt_end timestamptz;
      charged bigint;
    begin
      if p_digest is not null then
        select * into k from api_key where digest = p_digest;
        if not found then a.verdict := 'unknown'; return a; end if;
        if k.revoked_at is not null then a.verdict := 'revoked'; return a; end if;
        if k.expires_at <= moment then a.verdict := 'expired'; return a; end if;
        select * into o from organization where id = k.organization_id;
        a.key_id := k.id;
        own_holder := 'key:' || k.id;
        a.holder_quota := k.monthly_unit_quota;
        a.burst_limit := k.requests_per_minute;
      else
        select * into s from session where id = p_session and ended_at is null and expires_at > moment;
        if not found then a.verdict := 'unknown'; return a; end if;
        select * into m from member where id = s.member_id and removed_at is null;
        if not found then a.verdict := 'unknown'; return a; end if;
        select * into o from organization where id = m.organization_id;
        a.member_id := m.id;
        a.role := m.role;
        a.session_expires_at := s.expires_at;
        own_holder := 'member:' || m.id;
        a.holder_quota := o.monthly_unit_quota;
        a.burst_limit := o.member_requests_per_minute;
      end if;
      a.organization_id := o.id;
      a.keeps_bodies := o.keeps_bodies;
      a.organization_quota := o.monthly_unit_quota;
      a.holder_used := used(own_holder);
      a.organization_used := used('organization:' || o.id);
      a.period := current_period();
      a.period_seconds := extract(epoch from
        (date_trunc('month', now() at time zone 'utc') + interval '1 month') - date_trunc('month', now() at time zone 'utc'));
      a.period_remaining := extract(epoch from
        (date_trunc('month', now() at time zone 'utc') + interval '1 month') - (now() at time zone 'utc'));
      -- Burst figures stay those of an untouched bucket for a refusal that comes before it.
      a.burst_remaining := a.burst_limit;
      a.burst_seconds := 0;

      if o.disabled_at is not null then a.verdict := 'disabled'; return a; end if;
      if p_digest is not null then
        if cardinality(k.allowed_addresses) > 0
           and not exists (select from unnest(k.allowed_addresses) as allowed where p_address <<= allowed)
        then a.verdict := 'address'; return a; end if;
        if p_scope is null or p_scope <> all (k.scopes) then a.verdict := 'scope'; return a; end if;
      elsif m.role <> all (p_roles) then a.verdict := 'role'; return a;
      end if;

      -- The generic cell rate algorithm: the bucket is full while empty_at is a minute ahead.
      step := interval '60 seconds' / a.burst_limit;
      insert into burst_bucket as b (holder, empty_at) values (own_holder, moment + step)
      on conflict (holder) do update set empty_at = greatest(b.empty_at, clock_timestamp()) + step
      where greatest(b.empty_at, clock_timestamp()) + step <= clock_timestamp() + interval '60 seconds'
      returning empty_at into debt_end;
      if debt_end is null then
        select empty_at into debt_end from burst_bucket where holder = own_holder;
        a.burst_remaining := 0;
        a.burst_seconds := greatest(0.001, extract(epoch from debt_end + step - clock_timestamp()) - 60);
        a.verdict := 'burst';
        return a;
      end if;
      a.burst_seconds := greatest(0, extract(epoch from debt_end - clock_timestamp()));
      a.burst_remaining := least(a.burst_limit - 1,
        floor((60 - a.burst_seconds) / extract(epoch from step) + 1e-6))::integer;

      if p_units > 0 then
        charged := charge(own_holder, p_units, a.holder_quota);
        if charged is null then
          -- Others may have charged since it was first read.
          a.holder_used := used(own_holder);
          a.verdict := 'quota';
          return a;
        end if;
        a.holder_used := charged;
        charged := charge('organization:' || o.id, p_units, a.organization_quota);
        if charged is null then
          update month_usage set units = units - p_units where holder = own_holder and period = current_period()
          returning units into a.holder_used;
          a.organization_used := used('organization:' || o.id);
          a.verdict := 'organization_quota';
          return a;
        end if;
        a.organization_used := charged;
      end if;
      a.verdict := 'admitted';
      return a;
    end $$;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop function admit(bytea, uuid, text, text[], inet, bigint);
    drop type admission;
    drop function charge(text, bigint, bigint), used(text), current_period();
    drop table month_usage, burst_bucket, sign_in_attempt;
  `);
}
