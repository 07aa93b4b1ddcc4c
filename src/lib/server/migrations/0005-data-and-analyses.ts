import type { Migration } from './migration';

/** Uploaded files, sortings with their units, analyses, and exclusions. */
export const dataAndAnalyses: Migration = {
	name: '0005-data-and-analyses',
	sql: /* sql */ `
CREATE TABLE data_file (
	id uuid PRIMARY KEY,
	session_id uuid NOT NULL REFERENCES session,
	kind text NOT NULL CHECK (kind IN ('position', 'spikes', 'units', 'epochs')),
	sha256 text NOT NULL CHECK (sha256 ~ '^[0-9a-f]{64}$'),
	bytes bigint NOT NULL CHECK (bytes >= 0),
	original_name text NOT NULL,
	format text NOT NULL CHECK (format IN ('csv', 'tsv', 'npy')),
	state text NOT NULL CHECK (state IN ('received', 'taken-in', 'refused')),
	-- What the reader was told: separator, decimal mark, columns to fields, scale.
	reading jsonb NOT NULL DEFAULT '{}',
	row_count bigint CHECK (row_count >= 0),
	columns text[],
	warnings jsonb NOT NULL DEFAULT '[]',
	refusal jsonb,
	-- Positions as little-endian float64 (all t, all x, all y), kept in storage: a long track
	-- would not pass through a row without filling memory. Spikes live with their units.
	parsed_sha256 text CHECK (parsed_sha256 ~ '^[0-9a-f]{64}$'),
	uploaded_by uuid NOT NULL REFERENCES person,
	uploaded_at timestamptz NOT NULL DEFAULT now(),
	withdrawn_at timestamptz,
	withdrawn_by uuid REFERENCES person,
	withdrawn_why text,
	CHECK ((withdrawn_at IS NULL) = (withdrawn_why IS NULL)),
	CHECK ((state = 'refused') = (refusal IS NOT NULL)),
	CHECK (state <> 'taken-in' OR row_count IS NOT NULL),
	CHECK (state <> 'taken-in' OR kind <> 'position' OR parsed_sha256 IS NOT NULL)
);
CREATE INDEX data_file_session_idx ON data_file (session_id, kind, uploaded_at);
CREATE INDEX data_file_sha256_idx ON data_file (sha256);
-- One position track is in force for a session.
CREATE UNIQUE INDEX data_file_position_key ON data_file (session_id)
	WHERE kind = 'position' AND state = 'taken-in' AND withdrawn_at IS NULL;

CREATE TABLE sorting (
	id uuid PRIMARY KEY,
	animal_id uuid NOT NULL REFERENCES animal,
	day_id uuid NOT NULL REFERENCES day,
	person_id uuid NOT NULL REFERENCES person,
	program text NOT NULL DEFAULT '',
	program_version text NOT NULL DEFAULT '',
	supersedes_id uuid REFERENCES sorting,
	data_file_id uuid REFERENCES data_file,
	created_at timestamptz NOT NULL DEFAULT now(),
	withdrawn_at timestamptz,
	withdrawn_by uuid REFERENCES person,
	withdrawn_why text,
	CHECK ((withdrawn_at IS NULL) = (withdrawn_why IS NULL)),
	CHECK (supersedes_id <> id)
);

CREATE TABLE sorting_session (
	sorting_id uuid NOT NULL REFERENCES sorting,
	session_id uuid NOT NULL REFERENCES session,
	PRIMARY KEY (sorting_id, session_id)
);
CREATE INDEX sorting_session_session_idx ON sorting_session (session_id);

CREATE TABLE unit (
	id uuid PRIMARY KEY,
	sorting_id uuid NOT NULL REFERENCES sorting,
	label text NOT NULL CHECK (length(label) BETWEEN 1 AND 60),
	-- As the file says it; bundle_id is set where the implant has such a bundle.
	bundle_label text,
	bundle_id uuid REFERENCES bundle,
	class text CHECK (class IN ('principal', 'interneuron', 'unclear')),
	amplitude_uv numeric(8,2),
	noise_uv numeric(8,2),
	spike_count integer NOT NULL CHECK (spike_count >= 0),
	first_spike_s double precision,
	last_spike_s double precision,
	spikes bytea NOT NULL
);
-- Many labs number units within each bundle, so a label alone need not be one unit.
CREATE UNIQUE INDEX unit_label_key ON unit (sorting_id, label, coalesce(bundle_label, ''));
ALTER TABLE unit ALTER COLUMN spikes SET STORAGE EXTERNAL;
CREATE TRIGGER unit_spikes_immutable BEFORE UPDATE OF spikes, label, sorting_id, spike_count ON unit
	FOR EACH ROW WHEN (
		OLD.spikes IS DISTINCT FROM NEW.spikes OR OLD.label <> NEW.label
		OR OLD.sorting_id <> NEW.sorting_id OR OLD.spike_count <> NEW.spike_count
	) EXECUTE FUNCTION refuse_change();

CREATE TABLE analysis (
	id uuid PRIMARY KEY,
	session_id uuid NOT NULL REFERENCES session,
	sorting_id uuid NOT NULL REFERENCES sorting,
	position_file_id uuid NOT NULL REFERENCES data_file,
	parameters jsonb NOT NULL,
	-- Epochs, arena and its ends as they stood when asked: later edits of the session change nothing.
	setup jsonb NOT NULL DEFAULT '{}',
	position_sha256 text NOT NULL,
	spikes_sha256 text NOT NULL,
	analysis_version text NOT NULL,
	code_version text NOT NULL,
	state text NOT NULL DEFAULT 'queued' CHECK (state IN ('queued', 'running', 'done', 'failed')),
	progress real NOT NULL DEFAULT 0 CHECK (progress BETWEEN 0 AND 1),
	attempts integer NOT NULL DEFAULT 0,
	-- Advisory-lock number that a living worker holds; a dead worker's lock is free.
	worker_lock bigint,
	job_id uuid,
	asked_by uuid REFERENCES person,
	asked_at timestamptz NOT NULL DEFAULT now(),
	started_at timestamptz,
	finished_at timestamptz,
	failure jsonb,
	warnings jsonb,
	units_used integer,
	windows integer,
	median_error_cm double precision,
	median_error_low_cm double precision,
	median_error_high_cm double precision,
	chance_median_error_cm double precision,
	result json,
	arrays_sha256 text,
	CHECK ((state = 'done') = (result IS NOT NULL)),
	CHECK ((state = 'failed') = (failure IS NOT NULL))
);
CREATE INDEX analysis_session_idx ON analysis (session_id, asked_at);
CREATE INDEX analysis_open_idx ON analysis (state) WHERE state IN ('queued', 'running');

CREATE FUNCTION analysis_done_is_final() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
	IF OLD.state = 'done' THEN
		RAISE EXCEPTION 'A finished analysis is kept as computed'
			USING ERRCODE = 'restrict_violation', CONSTRAINT = 'analysis_immutable';
	END IF;
	IF NEW.parameters <> OLD.parameters OR NEW.setup <> OLD.setup OR NEW.session_id <> OLD.session_id
		OR NEW.sorting_id <> OLD.sorting_id OR NEW.position_file_id <> OLD.position_file_id THEN
		RAISE EXCEPTION 'What an analysis was asked for stays as asked'
			USING ERRCODE = 'restrict_violation', CONSTRAINT = 'analysis_immutable';
	END IF;
	RETURN NEW;
END $$;
CREATE TRIGGER analysis_done_is_final BEFORE UPDATE ON analysis
	FOR EACH ROW EXECUTE FUNCTION analysis_done_is_final();
CREATE TRIGGER analysis_no_delete BEFORE DELETE ON analysis
	FOR EACH ROW EXECUTE FUNCTION refuse_change();

ALTER TABLE session ADD COLUMN current_analysis_id uuid REFERENCES analysis DEFERRABLE INITIALLY DEFERRED;

-- Listeners get ids only and read the rows with their own permissions.
CREATE FUNCTION tell_analysis() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
	PERFORM pg_notify('quarterturn_live',
		json_build_object('kind', 'analysis', 'id', NEW.id, 'sessionId', NEW.session_id)::text);
	RETURN NEW;
END $$;
CREATE TRIGGER tell_analysis AFTER INSERT OR UPDATE OF state, progress ON analysis
	FOR EACH ROW EXECUTE FUNCTION tell_analysis();

CREATE TABLE exclusion (
	id uuid PRIMARY KEY,
	unit_id uuid REFERENCES unit,
	bundle_id uuid REFERENCES bundle,
	session_id uuid REFERENCES session,
	day_id uuid REFERENCES day,
	reason text NOT NULL CHECK (reason IN ('not-a-unit', 'mixed-unit', 'unstable', 'hardware-fault',
		'tracking-fault', 'animal-state', 'wrong-place', 'protocol-deviation', 'other')),
	note text NOT NULL DEFAULT '',
	was_result_seen boolean NOT NULL,
	person_id uuid NOT NULL REFERENCES person,
	excluded_at timestamptz NOT NULL DEFAULT now(),
	withdrawn_at timestamptz,
	withdrawn_by uuid REFERENCES person,
	withdrawn_why text,
	CHECK ((withdrawn_at IS NULL) = (withdrawn_why IS NULL)),
	CONSTRAINT exclusion_of_one_thing CHECK (num_nonnulls(unit_id, bundle_id, session_id, day_id) = 1),
	CHECK (reason <> 'other' OR length(btrim(note)) > 0)
);
`
};
