import type { Migration } from './migration';

/** Drives, implants down to channels, and the ledger of turns with its travel rule. */
export const implantsAndTurns: Migration = {
	name: '0003-implants-and-turns',
	sql: /* sql */ `
CREATE TABLE drive_design (
	id uuid PRIMARY KEY,
	name text NOT NULL CHECK (length(btrim(name)) BETWEEN 1 AND 120),
	thread text NOT NULL DEFAULT '',
	pitch_um numeric(8,3) NOT NULL CHECK (pitch_um > 0 AND pitch_um <= 2000),
	travel_mm numeric(6,3) NOT NULL CHECK (travel_mm > 0 AND travel_mm <= 50),
	smallest_step_turns numeric(6,4) NOT NULL CHECK (smallest_step_turns > 0 AND smallest_step_turns <= 1),
	backlash_um numeric(7,2) NOT NULL DEFAULT 0 CHECK (backlash_um >= 0),
	is_clockwise_lowering boolean NOT NULL DEFAULT true,
	note text NOT NULL DEFAULT '',
	created_at timestamptz NOT NULL DEFAULT now(),
	revision integer NOT NULL DEFAULT 0,
	withdrawn_at timestamptz,
	withdrawn_by uuid REFERENCES person,
	withdrawn_why text,
	CHECK ((withdrawn_at IS NULL) = (withdrawn_why IS NULL))
);
CREATE UNIQUE INDEX drive_design_name_key ON drive_design (lower(name)) WHERE withdrawn_at IS NULL;

CREATE TABLE drive (
	id uuid PRIMARY KEY,
	design_id uuid NOT NULL REFERENCES drive_design,
	serial text NOT NULL CHECK (length(btrim(serial)) BETWEEN 1 AND 60),
	measured_pitch_um numeric(8,3) CHECK (measured_pitch_um > 0),
	mass_g numeric(6,2) CHECK (mass_g > 0),
	note text NOT NULL DEFAULT '',
	created_at timestamptz NOT NULL DEFAULT now(),
	revision integer NOT NULL DEFAULT 0,
	withdrawn_at timestamptz,
	withdrawn_by uuid REFERENCES person,
	withdrawn_why text,
	CHECK ((withdrawn_at IS NULL) = (withdrawn_why IS NULL))
);
CREATE UNIQUE INDEX drive_serial_key ON drive (design_id, lower(serial)) WHERE withdrawn_at IS NULL;

CREATE TABLE implant (
	id uuid PRIMARY KEY,
	animal_id uuid NOT NULL REFERENCES animal,
	letter text NOT NULL CHECK (letter ~ '^[A-Z]$'),
	surgery_day date NOT NULL,
	surgeon_id uuid NOT NULL REFERENCES person,
	drive_design_id uuid NOT NULL REFERENCES drive_design,
	drive_id uuid REFERENCES drive,
	-- Copied at surgery: a later edit of the design must not move a past depth.
	pitch_um numeric(8,3) NOT NULL CHECK (pitch_um > 0),
	travel_um numeric(9,2) NOT NULL CHECK (travel_um > 0),
	backlash_um numeric(7,2) NOT NULL CHECK (backlash_um >= 0),
	smallest_step_turns numeric(6,4) NOT NULL CHECK (smallest_step_turns > 0),
	is_clockwise_lowering boolean NOT NULL,
	mass_g numeric(6,2) CHECK (mass_g > 0),
	note text NOT NULL DEFAULT '',
	created_at timestamptz NOT NULL DEFAULT now(),
	revision integer NOT NULL DEFAULT 0,
	withdrawn_at timestamptz,
	withdrawn_by uuid REFERENCES person,
	withdrawn_why text,
	CHECK ((withdrawn_at IS NULL) = (withdrawn_why IS NULL))
);
CREATE UNIQUE INDEX implant_letter_key ON implant (animal_id, letter) WHERE withdrawn_at IS NULL;
CREATE UNIQUE INDEX implant_drive_key ON implant (drive_id) WHERE withdrawn_at IS NULL AND drive_id IS NOT NULL;

CREATE TABLE site (
	id uuid PRIMARY KEY,
	implant_id uuid NOT NULL REFERENCES implant,
	label text NOT NULL CHECK (length(btrim(label)) BETWEEN 1 AND 60),
	target_layer text NOT NULL DEFAULT '',
	layer_bands jsonb NOT NULL DEFAULT '[]',
	UNIQUE (implant_id, label)
);

CREATE TABLE carriage (
	id uuid PRIMARY KEY,
	site_id uuid NOT NULL REFERENCES site,
	implant_id uuid NOT NULL REFERENCES implant,
	label text NOT NULL CHECK (length(btrim(label)) BETWEEN 1 AND 40),
	screw_order integer NOT NULL CHECK (screw_order > 0),
	start_screw_um numeric(9,2) NOT NULL DEFAULT 0 CHECK (start_screw_um >= 0),
	UNIQUE (implant_id, label),
	UNIQUE (implant_id, screw_order)
);

CREATE TABLE bundle (
	id uuid PRIMARY KEY,
	carriage_id uuid NOT NULL REFERENCES carriage,
	implant_id uuid NOT NULL REFERENCES implant,
	label text NOT NULL CHECK (label ~ '^[A-Za-z0-9][A-Za-z0-9_.-]{0,23}$'),
	kind text NOT NULL CHECK (kind IN ('tetrode', 'stereotrode', 'single-wire', 'shank')),
	entry_ap_mm numeric(7,3),
	entry_ml_mm numeric(7,3),
	tilt_deg numeric(6,2) NOT NULL DEFAULT 0 CHECK (tilt_deg BETWEEN 0 AND 90),
	azimuth_deg numeric(6,2) NOT NULL DEFAULT 0 CHECK (azimuth_deg BETWEEN -360 AND 360),
	start_depth_um numeric(9,2) NOT NULL DEFAULT 0,
	zero text NOT NULL DEFAULT 'dura' CHECK (zero IN ('pia', 'dura', 'skull', 'guide-exit')),
	zero_uncertainty_um numeric(7,2) CHECK (zero_uncertainty_um >= 0),
	UNIQUE (implant_id, label)
);

CREATE TABLE bundle_role (
	id uuid PRIMARY KEY,
	bundle_id uuid NOT NULL REFERENCES bundle,
	role text NOT NULL CHECK (role IN ('record', 'reference', 'field-potential', 'stimulate',
		'cannula', 'fibre', 'fixed', 'spare')),
	target_layer text NOT NULL DEFAULT '',
	from_day date NOT NULL,
	until_day date CHECK (until_day >= from_day),
	CONSTRAINT bundle_role_one_at_a_time EXCLUDE USING gist (
		bundle_id WITH =, daterange(from_day, until_day, '[)') WITH &&
	)
);

CREATE TABLE channel (
	id uuid PRIMARY KEY,
	bundle_id uuid NOT NULL REFERENCES bundle,
	number integer NOT NULL CHECK (number > 0),
	label text NOT NULL DEFAULT '',
	shank_x_um numeric(8,2),
	shank_y_um numeric(8,2),
	UNIQUE (bundle_id, number)
);

CREATE TABLE turn (
	id uuid PRIMARY KEY,
	carriage_id uuid NOT NULL REFERENCES carriage,
	done_at timestamptz NOT NULL,
	entered_at timestamptz NOT NULL DEFAULT now(),
	turns numeric(8,5) NOT NULL CHECK (abs(turns) <= 40),
	person_id uuid NOT NULL REFERENCES person,
	reason text NOT NULL DEFAULT '',
	replaces_id uuid UNIQUE REFERENCES turn,
	is_entered_later boolean NOT NULL DEFAULT false,
	CONSTRAINT turn_zero_only_voids CHECK (turns <> 0 OR replaces_id IS NOT NULL)
);
CREATE INDEX turn_carriage_idx ON turn (carriage_id, done_at);
CREATE TRIGGER turn_immutable BEFORE UPDATE OR DELETE ON turn
	FOR EACH ROW EXECUTE FUNCTION refuse_change();

-- The ledger in force: rows that no later row replaces, by the time they were done.
CREATE VIEW turn_in_force AS
	SELECT t.*,
		c.start_screw_um + i.pitch_um * sum(t.turns) OVER (
			PARTITION BY t.carriage_id ORDER BY t.done_at, t.id
		) AS screw_um
	FROM turn t
	JOIN carriage c ON c.id = t.carriage_id
	JOIN implant i ON i.id = c.implant_id
	WHERE NOT EXISTS (SELECT 1 FROM turn r WHERE r.replaces_id = t.id);

-- Two writers meet at the carriage's row: the second one re-reads what the first one wrote.
CREATE FUNCTION turn_lock_carriage() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
	PERFORM 1 FROM carriage WHERE id = NEW.carriage_id FOR UPDATE;
	IF NEW.replaces_id IS NOT NULL AND NOT EXISTS (
		SELECT 1 FROM turn WHERE id = NEW.replaces_id AND carriage_id = NEW.carriage_id
	) THEN
		RAISE EXCEPTION 'A correction replaces a turn of the same carriage'
			USING ERRCODE = 'check_violation', CONSTRAINT = 'turn_replaces_same_carriage';
	END IF;
	RETURN NEW;
END $$;
CREATE TRIGGER turn_lock_carriage BEFORE INSERT ON turn
	FOR EACH ROW EXECUTE FUNCTION turn_lock_carriage();

CREATE FUNCTION turn_within_travel() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE
	worst record;
	limit_um numeric;
BEGIN
	SELECT i.travel_um INTO limit_um FROM carriage c JOIN implant i ON i.id = c.implant_id
		WHERE c.id = NEW.carriage_id;
	-- A turn is typed to five decimals, so a sum of thirds may pass the end by a hair.
	SELECT done_at, screw_um INTO worst FROM turn_in_force
		WHERE carriage_id = NEW.carriage_id AND (screw_um < -0.01 OR screw_um > limit_um + 0.01)
		ORDER BY done_at, id LIMIT 1;
	IF FOUND THEN
		RAISE EXCEPTION 'The screw would stand at % um on % (0 to % um allowed)',
			worst.screw_um, worst.done_at, limit_um
			USING ERRCODE = 'check_violation', CONSTRAINT = 'turn_within_travel';
	END IF;
	RETURN NEW;
END $$;
CREATE TRIGGER turn_within_travel AFTER INSERT ON turn
	FOR EACH ROW EXECUTE FUNCTION turn_within_travel();

CREATE TABLE landmark (
	id uuid PRIMARY KEY,
	bundle_id uuid NOT NULL REFERENCES bundle,
	seen_at timestamptz NOT NULL,
	entered_at timestamptz NOT NULL DEFAULT now(),
	person_id uuid NOT NULL REFERENCES person,
	sharp_wave text CHECK (sharp_wave IN ('positive', 'flat', 'negative')),
	ripples integer CHECK (ripples BETWEEN 0 AND 3),
	ripple_uv numeric(8,2) CHECK (ripple_uv >= 0),
	has_theta boolean,
	has_hash boolean,
	has_cells boolean,
	largest_uv numeric(8,2) CHECK (largest_uv >= 0),
	sign_convention text NOT NULL DEFAULT '',
	reference text NOT NULL DEFAULT '',
	note text NOT NULL DEFAULT '',
	is_entered_later boolean NOT NULL DEFAULT false,
	withdrawn_at timestamptz,
	withdrawn_by uuid REFERENCES person,
	withdrawn_why text,
	CHECK ((withdrawn_at IS NULL) = (withdrawn_why IS NULL))
);
CREATE INDEX landmark_bundle_idx ON landmark (bundle_id, seen_at);
`
};
