import type { MigrationStep, NamedMigration } from '../named-migration';

/**
 * The entities of a study, one table a kind. Every reference inside a study is a composite foreign key with the study,
 * so that a row can never point into another one; checked at commit, because one edit may write rows in any order.
 */
const up = `
CREATE TABLE policies (
  study_id uuid NOT NULL REFERENCES studies (id) ON DELETE CASCADE,
  id uuid NOT NULL,
  version integer NOT NULL CHECK (version > 0),
  parameter text NOT NULL,
  maturity text NOT NULL,
  body jsonb NOT NULL,
  PRIMARY KEY (study_id, id),
  UNIQUE (study_id, parameter, maturity) DEFERRABLE INITIALLY DEFERRED
);

CREATE TABLE elements (
  study_id uuid NOT NULL REFERENCES studies (id) ON DELETE CASCADE,
  id uuid NOT NULL,
  version integer NOT NULL CHECK (version > 0),
  key text NOT NULL,
  parent_id uuid,
  body jsonb NOT NULL,
  PRIMARY KEY (study_id, id),
  UNIQUE (study_id, key) DEFERRABLE INITIALLY DEFERRED,
  FOREIGN KEY (study_id, parent_id) REFERENCES elements (study_id, id) DEFERRABLE INITIALLY DEFERRED
);

CREATE TABLE requirements (
  study_id uuid NOT NULL REFERENCES studies (id) ON DELETE CASCADE,
  id uuid NOT NULL,
  version integer NOT NULL CHECK (version > 0),
  key text NOT NULL,
  state text NOT NULL CHECK (state IN ('in preparation', 'in review', 'baselined', 'withdrawn')),
  element_id uuid,
  owner_id uuid NOT NULL REFERENCES people (id),
  body jsonb NOT NULL,
  PRIMARY KEY (study_id, id),
  UNIQUE (study_id, key) DEFERRABLE INITIALLY DEFERRED,
  FOREIGN KEY (study_id, element_id) REFERENCES elements (study_id, id) DEFERRABLE INITIALLY DEFERRED
);

CREATE TABLE traces (
  study_id uuid NOT NULL REFERENCES studies (id) ON DELETE CASCADE,
  id uuid NOT NULL,
  version integer NOT NULL CHECK (version > 0),
  parent_id uuid NOT NULL,
  child_id uuid NOT NULL,
  share text NOT NULL CHECK (share IN ('none', 'proposed', 'adopted')),
  body jsonb NOT NULL,
  PRIMARY KEY (study_id, id),
  UNIQUE (study_id, parent_id, child_id) DEFERRABLE INITIALLY DEFERRED,
  FOREIGN KEY (study_id, parent_id) REFERENCES requirements (study_id, id) DEFERRABLE INITIALLY DEFERRED,
  FOREIGN KEY (study_id, child_id) REFERENCES requirements (study_id, id) DEFERRABLE INITIALLY DEFERRED
);
CREATE INDEX traces_child ON traces (study_id, child_id);

CREATE TABLE quantities (
  study_id uuid NOT NULL REFERENCES studies (id) ON DELETE CASCADE,
  id uuid NOT NULL,
  version integer NOT NULL CHECK (version > 0),
  key text NOT NULL,
  state text NOT NULL CHECK (state IN ('working', 'controlled')),
  element_id uuid,
  owner_id uuid NOT NULL REFERENCES people (id),
  -- What was typed stays in the body; the SI value is here for queries.
  si double precision,
  body jsonb NOT NULL,
  PRIMARY KEY (study_id, id),
  UNIQUE (study_id, key) DEFERRABLE INITIALLY DEFERRED,
  FOREIGN KEY (study_id, element_id) REFERENCES elements (study_id, id) DEFERRABLE INITIALLY DEFERRED
);

CREATE TABLE analyses (
  study_id uuid NOT NULL REFERENCES studies (id) ON DELETE CASCADE,
  id uuid NOT NULL,
  version integer NOT NULL CHECK (version > 0),
  key text NOT NULL,
  kind text NOT NULL CHECK (kind IN ('formula', 'method', 'external')),
  element_id uuid,
  author_id uuid NOT NULL REFERENCES people (id),
  body jsonb NOT NULL,
  PRIMARY KEY (study_id, id),
  UNIQUE (study_id, key) DEFERRABLE INITIALLY DEFERRED,
  FOREIGN KEY (study_id, element_id) REFERENCES elements (study_id, id) DEFERRABLE INITIALLY DEFERRED
);

CREATE TABLE bindings (
  study_id uuid NOT NULL,
  analysis_id uuid NOT NULL,
  position integer NOT NULL,
  name text NOT NULL,
  quantity_id uuid,
  source_analysis_id uuid,
  source_output text,
  constant text,
  PRIMARY KEY (study_id, analysis_id, position),
  FOREIGN KEY (study_id, analysis_id) REFERENCES analyses (study_id, id) ON DELETE CASCADE DEFERRABLE INITIALLY DEFERRED,
  FOREIGN KEY (study_id, quantity_id) REFERENCES quantities (study_id, id) DEFERRABLE INITIALLY DEFERRED,
  FOREIGN KEY (study_id, source_analysis_id) REFERENCES analyses (study_id, id) DEFERRABLE INITIALLY DEFERRED,
  CHECK (num_nonnulls(quantity_id, source_analysis_id, constant) = 1)
);

CREATE TABLE verifications (
  study_id uuid NOT NULL REFERENCES studies (id) ON DELETE CASCADE,
  id uuid NOT NULL,
  version integer NOT NULL CHECK (version > 0),
  requirement_id uuid NOT NULL,
  analysis_id uuid,
  output text,
  body jsonb NOT NULL,
  PRIMARY KEY (study_id, id),
  FOREIGN KEY (study_id, requirement_id) REFERENCES requirements (study_id, id) DEFERRABLE INITIALLY DEFERRED,
  FOREIGN KEY (study_id, analysis_id) REFERENCES analyses (study_id, id) DEFERRABLE INITIALLY DEFERRED
);
CREATE INDEX verifications_requirement ON verifications (study_id, requirement_id);

CREATE TABLE assessments (
  study_id uuid NOT NULL REFERENCES studies (id) ON DELETE CASCADE,
  id uuid NOT NULL,
  version integer NOT NULL CHECK (version > 0),
  requirement_id uuid NOT NULL,
  body jsonb NOT NULL,
  PRIMARY KEY (study_id, id),
  UNIQUE (study_id, requirement_id) DEFERRABLE INITIALLY DEFERRED,
  FOREIGN KEY (study_id, requirement_id) REFERENCES requirements (study_id, id) DEFERRABLE INITIALLY DEFERRED
);

CREATE TABLE departures (
  study_id uuid NOT NULL REFERENCES studies (id) ON DELETE CASCADE,
  id uuid NOT NULL,
  version integer NOT NULL CHECK (version > 0),
  key text NOT NULL,
  requirement_id uuid NOT NULL,
  state text NOT NULL CHECK (state IN ('requested', 'in force', 'refused', 'expired')),
  expires date,
  body jsonb NOT NULL,
  PRIMARY KEY (study_id, id),
  UNIQUE (study_id, key) DEFERRABLE INITIALLY DEFERRED,
  FOREIGN KEY (study_id, requirement_id) REFERENCES requirements (study_id, id) DEFERRABLE INITIALLY DEFERRED
);

CREATE TABLE change_requests (
  study_id uuid NOT NULL REFERENCES studies (id) ON DELETE CASCADE,
  id uuid NOT NULL,
  version integer NOT NULL CHECK (version > 0),
  key text NOT NULL,
  state text NOT NULL,
  author_id uuid NOT NULL REFERENCES people (id),
  body jsonb NOT NULL,
  PRIMARY KEY (study_id, id),
  UNIQUE (study_id, key) DEFERRABLE INITIALLY DEFERRED
);

CREATE TABLE baselines (
  study_id uuid NOT NULL REFERENCES studies (id) ON DELETE CASCADE,
  id uuid NOT NULL,
  version integer NOT NULL CHECK (version > 0),
  key text NOT NULL,
  taken_at_revision bigint NOT NULL,
  digest text NOT NULL CHECK (length(digest) = 64),
  body jsonb NOT NULL,
  PRIMARY KEY (study_id, id),
  UNIQUE (study_id, key) DEFERRABLE INITIALLY DEFERRED
);

-- Canonical text, so that its SHA-256 can be recomputed byte for byte.
CREATE TABLE baseline_snapshots (
  study_id uuid NOT NULL,
  baseline_id uuid NOT NULL,
  content text NOT NULL,
  PRIMARY KEY (study_id, baseline_id),
  FOREIGN KEY (study_id, baseline_id) REFERENCES baselines (study_id, id) ON DELETE CASCADE DEFERRABLE INITIALLY DEFERRED
);

-- Derived state: written only by re-proving, in the transaction of the edit; a full re-proof must equal it.
CREATE TABLE results (
  study_id uuid NOT NULL,
  analysis_id uuid NOT NULL,
  output text NOT NULL,
  value double precision,
  failure jsonb,
  PRIMARY KEY (study_id, analysis_id, output),
  FOREIGN KEY (study_id, analysis_id) REFERENCES analyses (study_id, id) ON DELETE CASCADE DEFERRABLE INITIALLY DEFERRED,
  CHECK ((value IS NULL) <> (failure IS NULL))
);
CREATE TABLE verdicts (
  study_id uuid NOT NULL,
  requirement_id uuid NOT NULL,
  verdict text NOT NULL,
  compliance text NOT NULL,
  close_out text NOT NULL,
  value double precision,
  margin double precision,
  percent double precision,
  proven jsonb NOT NULL,
  PRIMARY KEY (study_id, requirement_id),
  FOREIGN KEY (study_id, requirement_id) REFERENCES requirements (study_id, id) ON DELETE CASCADE DEFERRABLE INITIALLY DEFERRED
);
CREATE TABLE verdict_history (
  study_id uuid NOT NULL,
  revision bigint NOT NULL,
  requirement_id uuid NOT NULL,
  key text NOT NULL,
  was text,
  verdict text,
  value double precision,
  margin double precision,
  percent double precision,
  PRIMARY KEY (study_id, requirement_id, revision)
);

CREATE TABLE ledger (
  study_id uuid NOT NULL REFERENCES studies (id),
  revision bigint NOT NULL CHECK (revision > 0),
  person_id uuid NOT NULL REFERENCES people (id),
  at timestamptz NOT NULL,
  summary text NOT NULL,
  why text NOT NULL,
  commands jsonb NOT NULL,
  patch jsonb NOT NULL,
  -- Verdict words that turned, for notices; the moved margins are in verdict_history.
  moved jsonb NOT NULL,
  previous text NOT NULL,
  digest text NOT NULL CHECK (length(digest) = 64),
  -- The very text that was digested, so that the chain can be checked without a second serializer.
  content text NOT NULL,
  PRIMARY KEY (study_id, revision)
);
CREATE TRIGGER ledger_append_only BEFORE UPDATE OR DELETE ON ledger
  FOR EACH ROW EXECUTE FUNCTION refuse_audit_change();
CREATE TRIGGER ledger_no_truncate BEFORE TRUNCATE ON ledger
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_audit_change();
`;

const down = `
DROP TABLE ledger, verdict_history, verdicts, results, baseline_snapshots, baselines, change_requests, departures,
  assessments, verifications, bindings, analyses, quantities, traces, requirements, elements, policies;
`;

/** Study entities, derived state, ledger. */
export const studies: NamedMigration = {
  name: '002-studies',
  up: async ({ context }: MigrationStep) => {
    await context.sequelize.query(up);
  },
  down: async ({ context }: MigrationStep) => {
    await context.sequelize.query(down);
  },
};
