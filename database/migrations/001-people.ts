import type { MigrationStep, NamedMigration } from '../named-migration';

const up = `
CREATE TABLE studies (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(),
  key text NOT NULL UNIQUE CHECK (key ~ '^[A-Za-z0-9][A-Za-z0-9-]{0,62}$'),
  name text NOT NULL CHECK (length(name) BETWEEN 1 AND 200),
  revision bigint NOT NULL DEFAULT 0 CHECK (revision >= 0),
  ledger_head text,
  settings jsonb NOT NULL DEFAULT '{}',
  version integer NOT NULL DEFAULT 1,
  created_at timestamptz NOT NULL DEFAULT now()
);

CREATE TABLE people (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(),
  email text NOT NULL CHECK (length(email) <= 254),
  name text NOT NULL CHECK (length(name) BETWEEN 1 AND 200),
  password_hash text,
  administrator boolean NOT NULL DEFAULT false,
  disabled boolean NOT NULL DEFAULT false,
  demonstration boolean NOT NULL DEFAULT false,
  version integer NOT NULL DEFAULT 1,
  created_at timestamptz NOT NULL DEFAULT now()
);
CREATE UNIQUE INDEX people_email ON people (lower(email));

CREATE TABLE memberships (
  study_id uuid NOT NULL REFERENCES studies (id) ON DELETE CASCADE,
  person_id uuid NOT NULL REFERENCES people (id),
  roles text[] NOT NULL CHECK (
    cardinality(roles) > 0
    AND roles <@ ARRAY['requirements-owner', 'analyst', 'board-member', 'board-chair', 'reader']
  ),
  granted_at timestamptz NOT NULL DEFAULT now(),
  PRIMARY KEY (study_id, person_id)
);
CREATE INDEX memberships_person ON memberships (person_id);

-- One-time links. Only the digest of a token is kept, so that reading this table lets nobody in.
CREATE TABLE tokens (
  digest text PRIMARY KEY CHECK (length(digest) = 64),
  purpose text NOT NULL CHECK (purpose IN ('invite', 'reset', 'first-administrator')),
  person_id uuid REFERENCES people (id) ON DELETE CASCADE,
  expires_at timestamptz NOT NULL,
  used_at timestamptz,
  created_at timestamptz NOT NULL DEFAULT now(),
  CHECK ((person_id IS NULL) = (purpose = 'first-administrator'))
);
CREATE INDEX tokens_person ON tokens (person_id);

CREATE TABLE people_audit (
  id bigint GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
  at timestamptz NOT NULL DEFAULT now(),
  actor_id uuid,
  subject_id uuid,
  study_id uuid,
  action text NOT NULL,
  detail jsonb NOT NULL DEFAULT '{}'
);
CREATE INDEX people_audit_subject ON people_audit (subject_id, id);

CREATE FUNCTION refuse_audit_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION 'audit lines are only ever added';
END $$;
CREATE TRIGGER people_audit_append_only BEFORE UPDATE OR DELETE ON people_audit
  FOR EACH ROW EXECUTE FUNCTION refuse_audit_change();

-- The outbox: a mail is queued in the transaction of what caused it; its text is emptied once it is sent.
CREATE TABLE mails (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(),
  recipient text NOT NULL,
  subject text NOT NULL,
  body text,
  status text NOT NULL DEFAULT 'queued' CHECK (status IN ('queued', 'sent', 'failed')),
  attempts integer NOT NULL DEFAULT 0,
  next_attempt_at timestamptz NOT NULL DEFAULT now(),
  last_error text,
  created_at timestamptz NOT NULL DEFAULT now(),
  sent_at timestamptz
);
CREATE INDEX mails_queued ON mails (next_attempt_at) WHERE status = 'queued';

-- Columns sid, sess and expire are those of connect-pg-simple; the rest is ours, kept by the database's clock.
CREATE TABLE sessions (
  sid text PRIMARY KEY,
  sess json NOT NULL,
  expire timestamptz NOT NULL,
  id uuid NOT NULL DEFAULT gen_random_uuid() UNIQUE,
  person_id uuid GENERATED ALWAYS AS ((sess -> 'passport' ->> 'user')::uuid) STORED REFERENCES people (id) ON DELETE CASCADE,
  created_at timestamptz NOT NULL DEFAULT now(),
  last_seen_at timestamptz NOT NULL DEFAULT now()
);
CREATE INDEX sessions_person ON sessions (person_id);
CREATE INDEX sessions_expire ON sessions (expire);

-- The table layout that rate-limiter-flexible expects.
CREATE TABLE throttles (
  key varchar(255) PRIMARY KEY,
  points integer NOT NULL DEFAULT 0,
  expire bigint
);

CREATE TABLE idempotency_keys (
  person_id uuid NOT NULL REFERENCES people (id) ON DELETE CASCADE,
  key uuid NOT NULL,
  study_id uuid REFERENCES studies (id) ON DELETE CASCADE,
  request_digest text NOT NULL,
  status integer NOT NULL,
  body jsonb,
  at timestamptz NOT NULL DEFAULT now(),
  PRIMARY KEY (person_id, key)
);
CREATE INDEX idempotency_keys_at ON idempotency_keys (at);

-- Whatever ends a session or changes a right tells every server process, so that open live streams close at once.
CREATE FUNCTION announce_access_change() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE
  changed uuid;
BEGIN
  IF TG_TABLE_NAME = 'people' THEN
    changed := NEW.id;
  ELSE
    changed := OLD.person_id;
  END IF;
  IF changed IS NOT NULL THEN
    PERFORM pg_notify('access_changed', changed::text);
  END IF;
  RETURN NULL;
END $$;
CREATE TRIGGER sessions_announce AFTER DELETE ON sessions FOR EACH ROW EXECUTE FUNCTION announce_access_change();
CREATE TRIGGER memberships_announce AFTER UPDATE OR DELETE ON memberships
  FOR EACH ROW EXECUTE FUNCTION announce_access_change();
CREATE TRIGGER people_announce AFTER UPDATE OF disabled, administrator ON people
  FOR EACH ROW EXECUTE FUNCTION announce_access_change();
`;

const down = `
DROP TABLE idempotency_keys, throttles, sessions, mails, people_audit, tokens, memberships, people, studies;
DROP FUNCTION announce_access_change(), refuse_audit_change();
`;

/** People, their roles in studies, sessions, one-time links, mail outbox, throttles and remembered answers. */
export const people: NamedMigration = {
  name: '001-people',
  up: async ({ context }: MigrationStep) => {
    await context.sequelize.query(up);
  },
  down: async ({ context }: MigrationStep) => {
    await context.sequelize.query(down);
  },
};
