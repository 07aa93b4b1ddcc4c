import type { Migration } from './migration';

/** People, their access, the lab's settings, mail, and the chained log. */
export const peopleAndLog: Migration = {
	name: '0001-people-and-log',
	sql: /* sql */ `
CREATE EXTENSION IF NOT EXISTS btree_gist;

CREATE TABLE person (
	id uuid PRIMARY KEY,
	email text NOT NULL CHECK (email = lower(email) AND position('@' in email) > 1),
	name text NOT NULL CHECK (length(btrim(name)) BETWEEN 1 AND 120),
	password_hash text,
	is_blinded boolean NOT NULL DEFAULT false,
	time_zone text,
	theme text CHECK (theme IN ('bench', 'evening', 'red')),
	created_at timestamptz NOT NULL DEFAULT now(),
	deactivated_at timestamptz,
	revision integer NOT NULL DEFAULT 0
);
CREATE UNIQUE INDEX person_email_key ON person (email);

CREATE TABLE role_grant (
	id uuid PRIMARY KEY,
	person_id uuid NOT NULL REFERENCES person,
	role text NOT NULL CHECK (role IN ('observer', 'experimenter', 'surgeon', 'welfare', 'pi', 'admin')),
	granted_at timestamptz NOT NULL DEFAULT now(),
	granted_by uuid REFERENCES person,
	revoked_at timestamptz,
	revoked_by uuid REFERENCES person,
	CHECK (revoked_at IS NULL OR revoked_at >= granted_at)
);
CREATE UNIQUE INDEX role_grant_once_key ON role_grant (person_id, role) WHERE revoked_at IS NULL;

CREATE TABLE auth_session (
	id_hash text PRIMARY KEY,
	person_id uuid NOT NULL REFERENCES person,
	created_at timestamptz NOT NULL DEFAULT now(),
	expires_at timestamptz NOT NULL,
	user_agent text,
	address text
);
CREATE INDEX auth_session_person_idx ON auth_session (person_id);

CREATE TABLE invitation (
	id uuid PRIMARY KEY,
	email text NOT NULL CHECK (email = lower(email)),
	name text NOT NULL,
	roles text[] NOT NULL CHECK (
		cardinality(roles) > 0
		AND roles <@ ARRAY['observer', 'experimenter', 'surgeon', 'welfare', 'pi', 'admin']
	),
	token_hash text NOT NULL UNIQUE,
	invited_by uuid REFERENCES person,
	created_at timestamptz NOT NULL DEFAULT now(),
	expires_at timestamptz NOT NULL,
	accepted_at timestamptz,
	accepted_by uuid REFERENCES person,
	withdrawn_at timestamptz,
	withdrawn_by uuid REFERENCES person,
	CHECK (accepted_at IS NULL OR withdrawn_at IS NULL)
);
CREATE UNIQUE INDEX invitation_open_key ON invitation (email)
	WHERE accepted_at IS NULL AND withdrawn_at IS NULL;

CREATE TABLE password_reset (
	id uuid PRIMARY KEY,
	person_id uuid NOT NULL REFERENCES person,
	token_hash text NOT NULL UNIQUE,
	created_at timestamptz NOT NULL DEFAULT now(),
	expires_at timestamptz NOT NULL,
	used_at timestamptz
);

CREATE TABLE api_token (
	id uuid PRIMARY KEY,
	person_id uuid NOT NULL REFERENCES person,
	name text NOT NULL CHECK (length(btrim(name)) BETWEEN 1 AND 120),
	token_hash text NOT NULL UNIQUE,
	shown_prefix text NOT NULL,
	scope text NOT NULL CHECK (scope IN ('read', 'write')),
	created_at timestamptz NOT NULL DEFAULT now(),
	created_by uuid REFERENCES person,
	expires_at timestamptz NOT NULL CHECK (expires_at > created_at),
	last_used_at timestamptz,
	revoked_at timestamptz,
	revoked_by uuid REFERENCES person
);

CREATE TABLE idempotency_key (
	person_id uuid NOT NULL REFERENCES person,
	key text NOT NULL CHECK (length(key) BETWEEN 1 AND 200),
	request_hash text NOT NULL,
	status integer NOT NULL,
	-- json, not jsonb: the same answer again, to the letter.
	body json NOT NULL,
	created_at timestamptz NOT NULL DEFAULT now(),
	PRIMARY KEY (person_id, key)
);

CREATE TABLE lab_setting (
	id uuid PRIMARY KEY,
	key text NOT NULL,
	version integer NOT NULL CHECK (version > 0),
	value jsonb NOT NULL,
	set_by uuid REFERENCES person,
	set_at timestamptz NOT NULL DEFAULT now(),
	UNIQUE (key, version)
);

CREATE TABLE outbox (
	id uuid PRIMARY KEY,
	dedupe_key text NOT NULL UNIQUE,
	kind text NOT NULL,
	to_email text NOT NULL,
	to_person_id uuid REFERENCES person,
	subject text NOT NULL,
	body_text text NOT NULL,
	created_at timestamptz NOT NULL DEFAULT now(),
	attempts integer NOT NULL DEFAULT 0 CHECK (attempts >= 0),
	last_attempt_at timestamptz,
	last_error text,
	sent_at timestamptz,
	dead_at timestamptz,
	CHECK (sent_at IS NULL OR dead_at IS NULL)
);
CREATE INDEX outbox_open_idx ON outbox (created_at) WHERE sent_at IS NULL AND dead_at IS NULL;

CREATE TABLE rate_limit (
	key varchar(255) PRIMARY KEY,
	points integer NOT NULL DEFAULT 0,
	expire bigint
);

CREATE TABLE log (
	id bigint PRIMARY KEY,
	at timestamptz NOT NULL,
	person_id uuid REFERENCES person,
	via text NOT NULL CHECK (via IN ('page', 'token', 'command', 'system')),
	action text NOT NULL CHECK (action ~ '^[a-z-]+(\\.[a-z-]+)+$'),
	subject_kind text NOT NULL,
	subject_id uuid,
	detail jsonb NOT NULL DEFAULT '{}',
	previous_hash bytea NOT NULL,
	hash bytea NOT NULL UNIQUE
);
CREATE INDEX log_subject_idx ON log (subject_kind, subject_id);

-- What a row's hash covers, in one place so that a verifier can repeat it.
CREATE FUNCTION log_payload(row_ log) RETURNS bytea LANGUAGE sql IMMUTABLE AS $$
	SELECT convert_to(jsonb_build_array(
		row_.id,
		to_char(row_.at AT TIME ZONE 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US"Z"'),
		row_.person_id, row_.via, row_.action, row_.subject_kind, row_.subject_id, row_.detail,
		encode(row_.previous_hash, 'hex')
	)::text, 'UTF8')
$$;

-- Writers queue here until they commit: a chain has one tail. The number is drawn under the
-- lock, so a missing number is a missing row.
CREATE FUNCTION log_chain() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
	PERFORM pg_advisory_xact_lock(7421001);
	SELECT id, hash INTO NEW.id, NEW.previous_hash FROM log ORDER BY id DESC LIMIT 1;
	NEW.id := coalesce(NEW.id, 0) + 1;
	NEW.previous_hash := coalesce(NEW.previous_hash, '\\x00');
	NEW.hash := sha256(log_payload(NEW));
	RETURN NEW;
END $$;
CREATE TRIGGER log_chain BEFORE INSERT ON log FOR EACH ROW EXECUTE FUNCTION log_chain();

CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
	RAISE EXCEPTION '% rows are kept as written', TG_TABLE_NAME
		USING ERRCODE = 'restrict_violation', CONSTRAINT = TG_TABLE_NAME || '_immutable';
END $$;
CREATE TRIGGER log_immutable BEFORE UPDATE OR DELETE ON log FOR EACH ROW EXECUTE FUNCTION refuse_change();
CREATE TRIGGER log_no_truncate BEFORE TRUNCATE ON log FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
CREATE TRIGGER lab_setting_immutable BEFORE UPDATE OR DELETE ON lab_setting
	FOR EACH ROW EXECUTE FUNCTION refuse_change();
`
};
