import type { MigrationInterface, QueryRunner } from 'typeorm'

/**
 * The tables of people, projects, calculations and live documents.
 *
 * Runs as `torfolio_owner`. The application is `torfolio_app`, which owns nothing: it gets the rights
 * named at the end, and row-level security binds it to the firm (`torfolio.firm`) and the account
 * (`torfolio.account`) that its transaction has set. `account`, `session`, `token` and `rate_window`
 * belong to no firm, as signing in comes before a firm is known; they carry no row-level security.
 */
export class Foundation1764590400000 implements MigrationInterface {
  name = 'Foundation1764590400000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(people)
    await runner.query(work)
    await runner.query(documents)
    await runner.query(audit)
    await runner.query(rowSecurity)
    await runner.query(rightsOf(await applicationRole(runner)))
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`
      DROP TABLE audit_event, contribution, pen, document_client, document_state, document_update, document,
        revision, participation, calculation, project, membership, token, rate_window, session, firm, account;
      DROP FUNCTION refuse_change();
      DROP FUNCTION current_firm();
      DROP FUNCTION current_account();
    `)
  }
}

/** The role of the application; on a database that could not have it, the owner's own (the start warns). */
const applicationRole = async (runner: QueryRunner): Promise<string> => {
  const known: unknown[] = await runner.query(`SELECT 1 FROM pg_roles WHERE rolname = 'torfolio_app'`)
  return known.length > 0 ? 'torfolio_app' : 'CURRENT_USER'
}

const people = `
  CREATE TABLE account (
    id uuid NOT NULL,
    email text NOT NULL,
    name text NOT NULL,
    password_hash text,
    is_active boolean NOT NULL DEFAULT true,
    is_demo boolean NOT NULL DEFAULT false,
    password_changed_at timestamptz,
    created_at timestamptz NOT NULL DEFAULT now(),
    CONSTRAINT account_pkey PRIMARY KEY (id),
    CONSTRAINT account_email UNIQUE (email),
    CONSTRAINT account_email_lower CHECK (email = lower(email))
  );

  CREATE TABLE session (
    sid varchar NOT NULL,
    sess json NOT NULL,
    expire timestamp(6) NOT NULL,
    CONSTRAINT session_pkey PRIMARY KEY (sid)
  );
  CREATE INDEX session_expire ON session (expire);
  CREATE INDEX session_account ON session ((sess -> 'passport' ->> 'user'));

  CREATE TABLE rate_window (
    key text NOT NULL,
    hits integer NOT NULL,
    resets_at timestamptz NOT NULL,
    CONSTRAINT rate_window_pkey PRIMARY KEY (key)
  );
  CREATE INDEX rate_window_resets_at ON rate_window (resets_at);

  CREATE TABLE firm (
    id uuid NOT NULL,
    name text NOT NULL,
    time_zone text NOT NULL DEFAULT 'UTC',
    number_prefix text NOT NULL DEFAULT 'TF',
    last_number integer NOT NULL DEFAULT 0,
    created_at timestamptz NOT NULL DEFAULT now(),
    CONSTRAINT firm_pkey PRIMARY KEY (id)
  );

  CREATE TABLE token (
    id uuid NOT NULL,
    hash bytea NOT NULL,
    purpose text NOT NULL,
    account_id uuid NOT NULL,
    firm_id uuid,
    expires_at timestamptz NOT NULL,
    used_at timestamptz,
    created_at timestamptz NOT NULL DEFAULT now(),
    CONSTRAINT token_pkey PRIMARY KEY (id),
    CONSTRAINT token_hash UNIQUE (hash),
    CONSTRAINT token_purpose CHECK (purpose IN ('password')),
    CONSTRAINT token_account_fk FOREIGN KEY (account_id) REFERENCES account (id) ON DELETE CASCADE,
    CONSTRAINT token_firm_fk FOREIGN KEY (firm_id) REFERENCES firm (id) ON DELETE CASCADE
  );
  CREATE INDEX token_account ON token (account_id);

  CREATE TABLE membership (
    id uuid NOT NULL,
    firm_id uuid NOT NULL,
    account_id uuid NOT NULL,
    role text NOT NULL,
    is_active boolean NOT NULL DEFAULT true,
    created_at timestamptz NOT NULL DEFAULT now(),
    CONSTRAINT membership_pkey PRIMARY KEY (id),
    CONSTRAINT membership_once UNIQUE (firm_id, account_id),
    CONSTRAINT membership_role CHECK (role IN ('administrator', 'steward', 'engineer', 'observer')),
    CONSTRAINT membership_firm_fk FOREIGN KEY (firm_id) REFERENCES firm (id),
    CONSTRAINT membership_account_fk FOREIGN KEY (account_id) REFERENCES account (id)
  );
  CREATE INDEX membership_account ON membership (account_id);
`

// Each reference below a firm goes by (firm_id, id): a row can never point into another firm.
const work = `
  CREATE TABLE project (
    id uuid NOT NULL,
    firm_id uuid NOT NULL,
    number text NOT NULL,
    name text NOT NULL,
    client text NOT NULL DEFAULT '',
    jurisdiction text NOT NULL DEFAULT '',
    disciplines text[] NOT NULL DEFAULT '{}',
    supervision text NOT NULL DEFAULT 'DSL2',
    created_at timestamptz NOT NULL DEFAULT now(),
    CONSTRAINT project_pkey PRIMARY KEY (id),
    CONSTRAINT project_in_firm UNIQUE (firm_id, id),
    CONSTRAINT project_number UNIQUE (firm_id, number),
    CONSTRAINT project_supervision CHECK (supervision IN ('DSL1', 'DSL2', 'DSL3')),
    CONSTRAINT project_firm_fk FOREIGN KEY (firm_id) REFERENCES firm (id)
  );

  CREATE TABLE calculation (
    id uuid NOT NULL,
    firm_id uuid NOT NULL,
    project_id uuid NOT NULL,
    number text NOT NULL,
    title text NOT NULL,
    due_on date,
    created_by uuid NOT NULL,
    created_at timestamptz NOT NULL DEFAULT now(),
    CONSTRAINT calculation_pkey PRIMARY KEY (id),
    CONSTRAINT calculation_in_firm UNIQUE (firm_id, id),
    CONSTRAINT calculation_number UNIQUE (firm_id, number),
    CONSTRAINT calculation_project_fk FOREIGN KEY (firm_id, project_id) REFERENCES project (firm_id, id),
    CONSTRAINT calculation_creator_fk FOREIGN KEY (created_by) REFERENCES account (id)
  );
  CREATE INDEX calculation_project ON calculation (firm_id, project_id);

  CREATE TABLE participation (
    id uuid NOT NULL,
    firm_id uuid NOT NULL,
    calculation_id uuid NOT NULL,
    account_id uuid NOT NULL,
    part text NOT NULL,
    appointed_by uuid NOT NULL,
    note text NOT NULL DEFAULT '',
    appointed_at timestamptz NOT NULL DEFAULT now(),
    ended_at timestamptz,
    CONSTRAINT participation_pkey PRIMARY KEY (id),
    CONSTRAINT participation_part CHECK (part IN ('preparer', 'checker', 'approver', 'observer')),
    CONSTRAINT participation_calculation_fk FOREIGN KEY (firm_id, calculation_id)
      REFERENCES calculation (firm_id, id),
    CONSTRAINT participation_account_fk FOREIGN KEY (account_id) REFERENCES account (id),
    CONSTRAINT participation_appointer_fk FOREIGN KEY (appointed_by) REFERENCES account (id)
  );
  CREATE UNIQUE INDEX participation_once ON participation (calculation_id, account_id, part)
    WHERE ended_at IS NULL;
  CREATE INDEX participation_account ON participation (firm_id, account_id);

  CREATE TABLE revision (
    id uuid NOT NULL,
    firm_id uuid NOT NULL,
    calculation_id uuid NOT NULL,
    letter text NOT NULL,
    ordinal integer NOT NULL,
    state text NOT NULL DEFAULT 'preparing',
    is_on_hold boolean NOT NULL DEFAULT false,
    reason text NOT NULL DEFAULT '',
    created_by uuid NOT NULL,
    created_at timestamptz NOT NULL DEFAULT now(),
    state_changed_at timestamptz NOT NULL DEFAULT now(),
    CONSTRAINT revision_pkey PRIMARY KEY (id),
    CONSTRAINT revision_in_firm UNIQUE (firm_id, id),
    CONSTRAINT revision_letter UNIQUE (calculation_id, letter),
    CONSTRAINT revision_state CHECK
      (state IN ('preparing', 'checking', 'returned', 'checked', 'issued', 'superseded', 'void')),
    CONSTRAINT revision_hold CHECK (NOT is_on_hold OR state = 'issued'),
    CONSTRAINT revision_calculation_fk FOREIGN KEY (firm_id, calculation_id)
      REFERENCES calculation (firm_id, id),
    CONSTRAINT revision_creator_fk FOREIGN KEY (created_by) REFERENCES account (id)
  );
`

const documents = `
  CREATE TABLE document (
    id uuid NOT NULL,
    firm_id uuid NOT NULL,
    revision_id uuid,
    head integer NOT NULL DEFAULT 0,
    epoch integer NOT NULL DEFAULT 1,
    writable boolean NOT NULL DEFAULT true,
    format integer NOT NULL,
    stored_bytes bigint NOT NULL DEFAULT 0,
    created_at timestamptz NOT NULL DEFAULT now(),
    changed_at timestamptz NOT NULL DEFAULT now(),
    CONSTRAINT document_pkey PRIMARY KEY (id),
    CONSTRAINT document_in_firm UNIQUE (firm_id, id),
    CONSTRAINT document_revision UNIQUE (revision_id),
    CONSTRAINT document_head CHECK (head >= 0 AND epoch >= 1),
    CONSTRAINT document_revision_fk FOREIGN KEY (firm_id, revision_id) REFERENCES revision (firm_id, id)
  );

  CREATE TABLE document_update (
    document_id uuid NOT NULL,
    head integer NOT NULL,
    firm_id uuid NOT NULL,
    account_id uuid,
    client_id bigint,
    bytes bytea NOT NULL,
    stored_at timestamptz NOT NULL DEFAULT now(),
    CONSTRAINT document_update_pkey PRIMARY KEY (document_id, head),
    CONSTRAINT document_update_fk FOREIGN KEY (firm_id, document_id) REFERENCES document (firm_id, id),
    CONSTRAINT document_update_account_fk FOREIGN KEY (account_id) REFERENCES account (id)
  );

  CREATE TABLE document_state (
    document_id uuid NOT NULL,
    firm_id uuid NOT NULL,
    head integer NOT NULL,
    bytes bytea NOT NULL,
    compacted_at timestamptz NOT NULL DEFAULT now(),
    CONSTRAINT document_state_pkey PRIMARY KEY (document_id),
    CONSTRAINT document_state_fk FOREIGN KEY (firm_id, document_id) REFERENCES document (firm_id, id)
  );

  CREATE TABLE document_client (
    document_id uuid NOT NULL,
    client_id bigint NOT NULL,
    firm_id uuid NOT NULL,
    account_id uuid NOT NULL,
    bound_at timestamptz NOT NULL DEFAULT now(),
    CONSTRAINT document_client_pkey PRIMARY KEY (document_id, client_id),
    CONSTRAINT document_client_fk FOREIGN KEY (firm_id, document_id) REFERENCES document (firm_id, id),
    CONSTRAINT document_client_account_fk FOREIGN KEY (account_id) REFERENCES account (id)
  );

  CREATE TABLE pen (
    document_id uuid NOT NULL,
    line text NOT NULL,
    firm_id uuid NOT NULL,
    holder uuid NOT NULL,
    client_id bigint NOT NULL,
    until timestamptz NOT NULL,
    CONSTRAINT pen_pkey PRIMARY KEY (document_id, line),
    CONSTRAINT pen_document_fk FOREIGN KEY (firm_id, document_id) REFERENCES document (firm_id, id),
    CONSTRAINT pen_holder_fk FOREIGN KEY (holder) REFERENCES account (id)
  );

  CREATE TABLE contribution (
    document_id uuid NOT NULL,
    head integer NOT NULL,
    position integer NOT NULL,
    firm_id uuid NOT NULL,
    account_id uuid,
    subject text NOT NULL,
    subject_id text NOT NULL,
    field text NOT NULL DEFAULT '',
    before text,
    after text,
    at timestamptz NOT NULL DEFAULT now(),
    CONSTRAINT contribution_pkey PRIMARY KEY (document_id, head, position),
    CONSTRAINT contribution_subject_kind CHECK (subject IN ('line', 'block', 'front')),
    CONSTRAINT contribution_document_fk FOREIGN KEY (firm_id, document_id) REFERENCES document (firm_id, id),
    CONSTRAINT contribution_account_fk FOREIGN KEY (account_id) REFERENCES account (id)
  );
  CREATE INDEX contribution_subject ON contribution (document_id, subject_id);
  CREATE INDEX contribution_account ON contribution (firm_id, account_id);
`

// A row trigger never sees TRUNCATE, so a statement trigger stands beside it.
const audit = `
  CREATE TABLE audit_event (
    id uuid NOT NULL,
    firm_id uuid,
    account_id uuid,
    action text NOT NULL,
    subject_id uuid,
    details jsonb NOT NULL DEFAULT '{}',
    at timestamptz NOT NULL DEFAULT now(),
    CONSTRAINT audit_event_pkey PRIMARY KEY (id),
    CONSTRAINT audit_event_firm_fk FOREIGN KEY (firm_id) REFERENCES firm (id),
    CONSTRAINT audit_event_account_fk FOREIGN KEY (account_id) REFERENCES account (id)
  );
  CREATE INDEX audit_event_firm ON audit_event (firm_id, at);
  CREATE INDEX audit_event_subject ON audit_event (subject_id);

  CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql AS $$
  BEGIN
    RAISE EXCEPTION 'rows of % are kept as they were written', TG_TABLE_NAME USING ERRCODE = '42501';
  END $$;
  CREATE TRIGGER audit_event_keep BEFORE UPDATE OR DELETE ON audit_event
    FOR EACH ROW EXECUTE FUNCTION refuse_change();
  CREATE TRIGGER audit_event_keep_all BEFORE TRUNCATE ON audit_event
    FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
`

// FORCE binds the owner as well: only a superuser, which neither role is, sees across firms.
const firmTables = [
  'project',
  'calculation',
  'participation',
  'revision',
  'document',
  'document_update',
  'document_state',
  'document_client',
  'pen',
  'contribution',
]

const rowSecurity = `
  CREATE FUNCTION current_firm() RETURNS uuid LANGUAGE sql STABLE AS
    $$ SELECT nullif(current_setting('torfolio.firm', true), '')::uuid $$;
  CREATE FUNCTION current_account() RETURNS uuid LANGUAGE sql STABLE AS
    $$ SELECT nullif(current_setting('torfolio.account', true), '')::uuid $$;

  ${firmTables
    .map(
      (table) => `
  ALTER TABLE ${table} ENABLE ROW LEVEL SECURITY;
  ALTER TABLE ${table} FORCE ROW LEVEL SECURITY;
  CREATE POLICY own_firm ON ${table}
    USING (firm_id = (SELECT current_firm())) WITH CHECK (firm_id = (SELECT current_firm()));`,
    )
    .join('\n')}

  -- A person sees their own memberships and firms before having chosen one.
  ALTER TABLE membership ENABLE ROW LEVEL SECURITY;
  ALTER TABLE membership FORCE ROW LEVEL SECURITY;
  CREATE POLICY own_firm ON membership
    USING (firm_id = (SELECT current_firm())) WITH CHECK (firm_id = (SELECT current_firm()));
  CREATE POLICY own_membership ON membership FOR SELECT USING (account_id = (SELECT current_account()));

  ALTER TABLE firm ENABLE ROW LEVEL SECURITY;
  ALTER TABLE firm FORCE ROW LEVEL SECURITY;
  CREATE POLICY own_firm ON firm
    USING (id = (SELECT current_firm())) WITH CHECK (id = (SELECT current_firm()));
  CREATE POLICY own_membership ON firm FOR SELECT USING
    (EXISTS (SELECT FROM membership WHERE membership.firm_id = firm.id
      AND membership.account_id = (SELECT current_account())));

  -- What concerns no firm may be written by anybody and read in no firm.
  ALTER TABLE audit_event ENABLE ROW LEVEL SECURITY;
  ALTER TABLE audit_event FORCE ROW LEVEL SECURITY;
  CREATE POLICY own_firm ON audit_event FOR SELECT USING (firm_id = (SELECT current_firm()));
  CREATE POLICY write_own_firm ON audit_event FOR INSERT
    WITH CHECK (firm_id IS NULL OR firm_id = (SELECT current_firm()));
`

const rightsOf = (app: string): string => `
  GRANT USAGE ON SCHEMA public TO ${app};
  GRANT SELECT ON schema_migration TO ${app};
  GRANT SELECT, INSERT, UPDATE, DELETE ON session, rate_window TO ${app};
  GRANT SELECT, INSERT, UPDATE ON account, token, firm, membership, project, calculation, participation,
    revision, document TO ${app};
  GRANT SELECT, INSERT, DELETE ON document_update TO ${app};
  GRANT SELECT, INSERT, UPDATE ON document_state TO ${app};
  GRANT SELECT, INSERT ON document_client, contribution TO ${app};
  GRANT SELECT, INSERT, UPDATE, DELETE ON pen TO ${app};
  GRANT SELECT, INSERT ON audit_event TO ${app};
`
