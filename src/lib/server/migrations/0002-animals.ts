import type { Migration } from './migration';

/** Projects, protocols and animals with their dated memberships and weights. */
export const animals: Migration = {
	name: '0002-animals',
	sql: /* sql */ `
CREATE TABLE project (
	id uuid PRIMARY KEY,
	name text NOT NULL CHECK (length(btrim(name)) BETWEEN 1 AND 120),
	summary text NOT NULL DEFAULT '',
	created_at timestamptz NOT NULL DEFAULT now(),
	revision integer NOT NULL DEFAULT 0,
	withdrawn_at timestamptz,
	withdrawn_by uuid REFERENCES person,
	withdrawn_why text,
	CHECK ((withdrawn_at IS NULL) = (withdrawn_why IS NULL))
);
CREATE UNIQUE INDEX project_name_key ON project (lower(name)) WHERE withdrawn_at IS NULL;

CREATE TABLE protocol (
	id uuid PRIMARY KEY,
	number text NOT NULL CHECK (length(btrim(number)) BETWEEN 1 AND 60),
	title text NOT NULL CHECK (length(btrim(title)) BETWEEN 1 AND 200),
	animals_allowed integer NOT NULL CHECK (animals_allowed > 0),
	surgeries_allowed integer NOT NULL CHECK (surgeries_allowed >= 0),
	restriction text NOT NULL CHECK (restriction IN ('none', 'food', 'water', 'food-and-water')),
	weight_floor_percent numeric(4,1) NOT NULL CHECK (weight_floor_percent BETWEEN 50 AND 100),
	longest_implant_days integer CHECK (longest_implant_days > 0),
	end_points text NOT NULL DEFAULT '',
	expires_on date NOT NULL,
	created_at timestamptz NOT NULL DEFAULT now(),
	revision integer NOT NULL DEFAULT 0,
	withdrawn_at timestamptz,
	withdrawn_by uuid REFERENCES person,
	withdrawn_why text,
	CHECK ((withdrawn_at IS NULL) = (withdrawn_why IS NULL))
);
CREATE UNIQUE INDEX protocol_number_key ON protocol (lower(number)) WHERE withdrawn_at IS NULL;

CREATE TABLE protocol_person (
	id uuid PRIMARY KEY,
	protocol_id uuid NOT NULL REFERENCES protocol,
	person_id uuid NOT NULL REFERENCES person,
	from_day date NOT NULL,
	until_day date CHECK (until_day >= from_day),
	CONSTRAINT protocol_person_once EXCLUDE USING gist (
		protocol_id WITH =, person_id WITH =, daterange(from_day, until_day, '[)') WITH &&
	)
);

CREATE TABLE animal (
	id uuid PRIMARY KEY,
	code text NOT NULL CHECK (code ~ '^[A-Za-z0-9][A-Za-z0-9_]{0,23}$'),
	species text NOT NULL CHECK (species IN ('rat', 'mouse', 'other')),
	strain text NOT NULL DEFAULT '',
	sex text NOT NULL CHECK (sex IN ('female', 'male', 'unknown')),
	birth_date date,
	source text NOT NULL DEFAULT '',
	status text NOT NULL DEFAULT 'in-lab' CHECK (status IN ('expected', 'in-lab', 'ended')),
	baseline_weight_g numeric(7,2) CHECK (baseline_weight_g > 0),
	note text NOT NULL DEFAULT '',
	is_simulated boolean NOT NULL DEFAULT false,
	created_at timestamptz NOT NULL DEFAULT now(),
	revision integer NOT NULL DEFAULT 0,
	withdrawn_at timestamptz,
	withdrawn_by uuid REFERENCES person,
	withdrawn_why text,
	CHECK ((withdrawn_at IS NULL) = (withdrawn_why IS NULL))
);
CREATE UNIQUE INDEX animal_code_key ON animal (upper(code));

CREATE TABLE animal_protocol (
	id uuid PRIMARY KEY,
	animal_id uuid NOT NULL REFERENCES animal,
	protocol_id uuid NOT NULL REFERENCES protocol,
	from_day date NOT NULL,
	until_day date CHECK (until_day >= from_day),
	-- One protocol decides about an animal at a time.
	CONSTRAINT animal_protocol_one_at_a_time EXCLUDE USING gist (
		animal_id WITH =, daterange(from_day, until_day, '[)') WITH &&
	)
);

CREATE TABLE animal_project (
	id uuid PRIMARY KEY,
	animal_id uuid NOT NULL REFERENCES animal,
	project_id uuid NOT NULL REFERENCES project,
	from_day date NOT NULL,
	until_day date CHECK (until_day >= from_day),
	CONSTRAINT animal_project_once EXCLUDE USING gist (
		animal_id WITH =, project_id WITH =, daterange(from_day, until_day, '[)') WITH &&
	)
);

CREATE TABLE sealed_allocation (
	id uuid PRIMARY KEY,
	project_id uuid NOT NULL REFERENCES project,
	animal_id uuid NOT NULL REFERENCES animal,
	group_label text NOT NULL CHECK (length(btrim(group_label)) BETWEEN 1 AND 60),
	sealed_at timestamptz NOT NULL DEFAULT now(),
	sealed_by uuid NOT NULL REFERENCES person,
	withdrawn_at timestamptz,
	withdrawn_by uuid REFERENCES person,
	withdrawn_why text,
	CHECK ((withdrawn_at IS NULL) = (withdrawn_why IS NULL))
);
CREATE UNIQUE INDEX sealed_allocation_once_key ON sealed_allocation (project_id, animal_id)
	WHERE withdrawn_at IS NULL;

CREATE TABLE deputy (
	id uuid PRIMARY KEY,
	animal_id uuid NOT NULL REFERENCES animal,
	person_id uuid NOT NULL REFERENCES person,
	named_by uuid NOT NULL REFERENCES person,
	named_at timestamptz NOT NULL DEFAULT now(),
	ended_at timestamptz,
	ended_by uuid REFERENCES person,
	CHECK (person_id <> named_by)
);
CREATE UNIQUE INDEX deputy_once_key ON deputy (animal_id, person_id) WHERE ended_at IS NULL;

CREATE TABLE weight (
	id uuid PRIMARY KEY,
	animal_id uuid NOT NULL REFERENCES animal,
	measured_at timestamptz NOT NULL,
	gross_g numeric(7,2) NOT NULL CHECK (gross_g > 0),
	implant_mass_g numeric(6,2) NOT NULL DEFAULT 0 CHECK (implant_mass_g >= 0),
	net_g numeric(7,2) GENERATED ALWAYS AS (gross_g - implant_mass_g) STORED CHECK (net_g > 0),
	measured_by uuid NOT NULL REFERENCES person,
	note text NOT NULL DEFAULT '',
	entered_at timestamptz NOT NULL DEFAULT now(),
	is_entered_later boolean NOT NULL DEFAULT false,
	withdrawn_at timestamptz,
	withdrawn_by uuid REFERENCES person,
	withdrawn_why text,
	CHECK ((withdrawn_at IS NULL) = (withdrawn_why IS NULL))
);
CREATE INDEX weight_animal_idx ON weight (animal_id, measured_at);
`
};
