import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table organization (
      id uuid primary key default gen_random_uuid(),
      name text not null check (length(name) between 1 and 120),
      monthly_unit_quota bigint not null check (monthly_unit_quota between 0 and 1e15),
      member_requests_per_minute integer not null default 600 check (member_requests_per_minute > 0),
      keeps_bodies boolean not null default true,
      disabled_at timestamptz,
      created_at timestamptz not null default now()
    );

    create table member (
      id uuid primary key default gen_random_uuid(),
      organization_id uuid not null references organization,
      email text not null check (length(email) between 3 and 254),
      name text not null check (length(name) between 1 and 200),
      role text not null check (role in ('owner', 'admin', 'developer', 'engineer', 'auditor')),
      password_hash text not null,
      removed_at timestamptz,
      created_at timestamptz not null default now()
    );
    create unique index member_email on member (lower(email)) where removed_at is null;
    create index member_organization on member (organization_id);

    create table session (
      id uuid primary key,
      member_id uuid not null references member,
      created_at timestamptz not null default now(),
      expires_at timestamptz not null,
      ended_at timestamptz,
      address inet,
      user_agent text
    );
    create index session_member on session (member_id);

    create table api_key (
      id text primary key check (id ~ '^[0-9A-Za-z]{8}$'),
      organization_id uuid not null references organization,
      name text not null check (length(name) between 1 and 60),
      digest bytea not null unique,
      pepper_version smallint not null default 1,
      ending text not null,
      scopes text[] not null,
      monthly_unit_quota bigint not null check (monthly_unit_quota between 0 and 1e15),
      requests_per_minute integer not null check (requests_per_minute > 0),
      allowed_addresses inet[] not null default '{}',
      expires_at timestamptz,
      created_by uuid not null references member,
      created_at timestamptz not null default now(),
      revoked_by uuid references member,
      revoked_at timestamptz,
      last_used_at timestamptz,
      version integer not null default 1
    );
    create unique index api_key_name on api_key (organization_id, lower(name)) where revoked_at is null;
    comment on column api_key.digest is 'HMAC-SHA256 of the whole key under the pepper of pepper_version';
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table api_key, session, member, organization');
}
