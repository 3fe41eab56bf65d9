export const ACCOUNT_TABLES: readonly string[] = [
  `CREATE TABLE accounts (
    id TEXT PRIMARY KEY NOT NULL,
    email TEXT NOT NULL UNIQUE,
    display_name TEXT NOT NULL,
    roles JSON NOT NULL,
    status TEXT NOT NULL CHECK (status IN ('invited', 'active', 'disabled')),
    password_hash TEXT,
    last_sign_in_at TEXT,
    version INTEGER NOT NULL DEFAULT 0,
    created_at TEXT NOT NULL,
    updated_at TEXT NOT NULL,
    CHECK (status <> 'active' OR password_hash IS NOT NULL)
  )`,
  `CREATE TABLE password_links (
    id TEXT PRIMARY KEY NOT NULL,
    kind TEXT NOT NULL CHECK (kind IN ('invitation', 'reset')),
    account_id TEXT NOT NULL REFERENCES accounts (id),
    token_hash TEXT NOT NULL UNIQUE,
    expires_at TEXT NOT NULL,
    used_at TEXT
  )`,
  'CREATE INDEX password_links_account ON password_links (account_id)',
  `CREATE TABLE refresh_sessions (
    id TEXT PRIMARY KEY NOT NULL,
    family_id TEXT NOT NULL,
    account_id TEXT NOT NULL REFERENCES accounts (id),
    token_hash TEXT NOT NULL UNIQUE,
    created_at TEXT NOT NULL,
    last_used_at TEXT NOT NULL,
    rotated_at TEXT,
    expires_at TEXT NOT NULL,
    revoked_at TEXT
  )`,
  'CREATE INDEX refresh_sessions_family ON refresh_sessions (family_id)',
  'CREATE INDEX refresh_sessions_account ON refresh_sessions (account_id)',
  `CREATE TABLE mails (
    id TEXT PRIMARY KEY NOT NULL,
    "to" TEXT NOT NULL,
    subject TEXT NOT NULL,
    text TEXT NOT NULL,
    sent_at TEXT NOT NULL
  )`,
  'CREATE INDEX mails_sent ON mails (sent_at, id)',
  `CREATE TABLE audit_entries (
    id INTEGER PRIMARY KEY AUTOINCREMENT,
    at TEXT NOT NULL,
    actor_id TEXT,
    actor_name TEXT NOT NULL,
    action TEXT NOT NULL,
    noun TEXT NOT NULL,
    noun_id TEXT,
    patient_id TEXT,
    version INTEGER,
    request_id TEXT,
    detail JSON NOT NULL
  )`,
  'CREATE INDEX audit_entries_noun ON audit_entries (noun, noun_id, id)',
  'CREATE INDEX audit_entries_patient ON audit_entries (patient_id, id)',
  'CREATE INDEX audit_entries_actor ON audit_entries (actor_id, id)',
  `CREATE TABLE idempotency_keys (
    key TEXT NOT NULL,
    account_id TEXT NOT NULL REFERENCES accounts (id),
    body_hash TEXT NOT NULL,
    status INTEGER NOT NULL,
    reply JSON NOT NULL,
    created_at TEXT NOT NULL,
    PRIMARY KEY (account_id, key)
  )`,
  'CREATE INDEX idempotency_keys_created ON idempotency_keys (created_at)',
  `CREATE TABLE settings (
    key TEXT PRIMARY KEY NOT NULL,
    value JSON NOT NULL
  )`,
];
