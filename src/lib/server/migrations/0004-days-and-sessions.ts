import type { Migration } from './migration';

/** Arenas, rigs, lab days with tallies, and sessions with their epochs. */
export const daysAndSessions: Migration = {
	name: '0004-days-and-sessions',
	sql: /* sql */ `
CREATE TABLE arena (
	id uuid PRIMARY KEY,
	name text NOT NULL CHECK (length(btrim(name)) BETWEEN 1 AND 120),
	description text NOT NULL CHECK (description ~ '^(straight|ring|rectangle|disc|polyline|tree):'),
	bin_cm numeric(5,2) NOT NULL DEFAULT 5 CHECK (bin_cm BETWEEN 0.5 AND 50),
	px_per_cm numeric(9,4) CHECK (px_per_cm > 0),
	-- Endpoints of a straight arena in camera coordinates; without them the principal axis serves.
	end_a_x numeric(9,3), end_a_y numeric(9,3), end_b_x numeric(9,3), end_b_y numeric(9,3),
	note text NOT NULL DEFAULT '',
	created_at timestamptz NOT NULL DEFAULT now(),
	revision integer NOT NULL DEFAULT 0,
	withdrawn_at timestamptz,
	withdrawn_by uuid REFERENCES person,
	withdrawn_why text,
	CHECK ((withdrawn_at IS NULL) = (withdrawn_why IS NULL)),
	CONSTRAINT arena_endpoints_together CHECK (num_nulls(end_a_x, end_a_y, end_b_x, end_b_y) IN (0, 4)),
	CONSTRAINT arena_endpoints_apart CHECK (
		end_a_x IS NULL OR (end_a_x, end_a_y) IS DISTINCT FROM (end_b_x, end_b_y)
	)
);
CREATE UNIQUE INDEX arena_name_key ON arena (lower(name)) WHERE withdrawn_at IS NULL;

CREATE TABLE rig (
	id uuid PRIMARY KEY,
	name text NOT NULL CHECK (length(btrim(name)) BETWEEN 1 AND 120),
	place text NOT NULL DEFAULT '',
	reference text NOT NULL DEFAULT '',
	ground text NOT NULL DEFAULT '',
	filters text NOT NULL DEFAULT '',
	gain text NOT NULL DEFAULT '',
	headstage_serial text NOT NULL DEFAULT '',
	note text NOT NULL DEFAULT '',
	created_at timestamptz NOT NULL DEFAULT now(),
	revision integer NOT NULL DEFAULT 0,
	withdrawn_at timestamptz,
	withdrawn_by uuid REFERENCES person,
	withdrawn_why text,
	CHECK ((withdrawn_at IS NULL) = (withdrawn_why IS NULL))
);
CREATE UNIQUE INDEX rig_name_key ON rig (lower(name)) WHERE withdrawn_at IS NULL;

CREATE TABLE day (
	id uuid PRIMARY KEY,
	animal_id uuid NOT NULL REFERENCES animal,
	date date NOT NULL,
	state text NOT NULL DEFAULT 'draft' CHECK (state IN ('draft', 'signed', 'countersigned')),
	responsible_id uuid REFERENCES person,
	created_at timestamptz NOT NULL DEFAULT now(),
	UNIQUE (animal_id, date),
	CHECK (state = 'draft' OR responsible_id IS NOT NULL)
);

CREATE FUNCTION day_goes_forward() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
	IF array_position(ARRAY['draft', 'signed', 'countersigned'], NEW.state)
		< array_position(ARRAY['draft', 'signed', 'countersigned'], OLD.state)
		OR NEW.animal_id <> OLD.animal_id OR NEW.date <> OLD.date THEN
		RAISE EXCEPTION 'A signed day stays signed, and a day keeps its date and animal'
			USING ERRCODE = 'restrict_violation', CONSTRAINT = 'day_goes_forward';
	END IF;
	RETURN NEW;
END $$;
CREATE TRIGGER day_goes_forward BEFORE UPDATE ON day FOR EACH ROW EXECUTE FUNCTION day_goes_forward();

CREATE TABLE session (
	id uuid PRIMARY KEY,
	animal_id uuid NOT NULL REFERENCES animal,
	day_id uuid NOT NULL REFERENCES day,
	starts_at timestamptz NOT NULL,
	clock_zero_at timestamptz NOT NULL,
	-- Where it ran unless an epoch says otherwise; a session without epochs is analysed in it.
	arena_id uuid REFERENCES arena,
	rig_id uuid REFERENCES rig,
	reference text NOT NULL DEFAULT '',
	ground text NOT NULL DEFAULT '',
	filters text NOT NULL DEFAULT '',
	gain text NOT NULL DEFAULT '',
	headstage_serial text NOT NULL DEFAULT '',
	note text NOT NULL DEFAULT '',
	created_by uuid NOT NULL REFERENCES person,
	created_at timestamptz NOT NULL DEFAULT now(),
	revision integer NOT NULL DEFAULT 0,
	withdrawn_at timestamptz,
	withdrawn_by uuid REFERENCES person,
	withdrawn_why text,
	CHECK ((withdrawn_at IS NULL) = (withdrawn_why IS NULL))
);
CREATE INDEX session_animal_idx ON session (animal_id, starts_at);
CREATE INDEX session_day_idx ON session (day_id);

CREATE TABLE epoch (
	id uuid PRIMARY KEY,
	session_id uuid NOT NULL REFERENCES session,
	name text NOT NULL CHECK (length(btrim(name)) BETWEEN 1 AND 60),
	kind text NOT NULL CHECK (kind IN ('run', 'rest', 'sleep', 'stimulation', 'excluded')),
	start_s numeric(14,6) NOT NULL,
	stop_s numeric(14,6) NOT NULL,
	arena_id uuid REFERENCES arena,
	configuration text NOT NULL DEFAULT '',
	withdrawn_at timestamptz,
	withdrawn_by uuid REFERENCES person,
	withdrawn_why text,
	CHECK ((withdrawn_at IS NULL) = (withdrawn_why IS NULL)),
	CHECK (stop_s > start_s),
	CONSTRAINT epoch_run_has_arena CHECK (kind <> 'run' OR arena_id IS NOT NULL),
	CONSTRAINT epoch_no_overlap EXCLUDE USING gist (
		session_id WITH =, numrange(start_s, stop_s, '[)') WITH &&
	) WHERE (withdrawn_at IS NULL)
);
CREATE UNIQUE INDEX epoch_name_key ON epoch (session_id, lower(name)) WHERE withdrawn_at IS NULL;

CREATE TABLE tally (
	id uuid PRIMARY KEY,
	day_id uuid NOT NULL REFERENCES day,
	bundle_id uuid NOT NULL REFERENCES bundle,
	source text NOT NULL CHECK (source IN ('by-eye', 'sorting')),
	moment text NOT NULL DEFAULT 'no-move' CHECK (moment IN ('before-move', 'after-move', 'no-move')),
	taken_at timestamptz NOT NULL,
	-- Blank is not zero: a count nobody made stays null.
	principal integer CHECK (principal >= 0),
	interneuron integer CHECK (interneuron >= 0),
	unclear integer CHECK (unclear >= 0),
	multi_unit integer CHECK (multi_unit >= 0),
	median_amplitude_uv numeric(8,2) CHECK (median_amplitude_uv >= 0),
	noise_uv numeric(8,2) CHECK (noise_uv >= 0),
	person_id uuid NOT NULL REFERENCES person,
	entered_at timestamptz NOT NULL DEFAULT now(),
	is_entered_later boolean NOT NULL DEFAULT false,
	withdrawn_at timestamptz,
	withdrawn_by uuid REFERENCES person,
	withdrawn_why text,
	CHECK ((withdrawn_at IS NULL) = (withdrawn_why IS NULL)),
	CHECK (num_nonnulls(principal, interneuron, unclear, multi_unit) > 0)
);
CREATE UNIQUE INDEX tally_once_key ON tally (day_id, bundle_id, source, moment) WHERE withdrawn_at IS NULL;
`
};
