-- The records: buildings as documents with projections, assessments, changes.
--
-- Every key leads with agency_id. Ids are UUID text as on the wire, moments
-- are microseconds since 1970 in UTC (_us), numbers end in their unit, yes and
-- no are 1 and 0, and null is "not recorded". What a released migration says is
-- never edited.
--
-- An officer's own SQL is welcome to read every table. `buildings`, `rooms`,
-- `openings` and `fuel_packages` hold buildings that are not deleted, as they
-- are now, except that `buildings` keeps deleted heads (deleted_at_us).

create table agencies (
    agency_id text not null,
    -- The sequence of the agency's latest row in changes. Counted here and not
    -- by an autoincrement: the row's lock makes sequences appear in the order
    -- of commits on any engine, so a reader of the feed skips none.
    change_sequence integer not null default 0,
    primary key (agency_id)
) strict, without rowid;

insert into agencies (agency_id) values ('local');

-- One row per building: what lists show and conditions are judged on. It is
-- projected from the document of its revision, but for the moments.
create table buildings (
    agency_id text not null references agencies (agency_id),
    building_id text not null,
    reference text,
    name text not null,
    revision integer not null check (revision > 0),
    rooms integer not null,
    created_at_us integer not null,
    updated_at_us integer not null,
    updated_by text not null,
    deleted_at_us integer,
    address_line text not null,
    address_place text not null,
    address_postcode text not null,
    longitude_deg real,
    latitude_deg real,
    occupancy_group text,
    construction_type text,
    inspected_on text,
    water_available_l_min real,
    alarm_monitored integer,
    sprinklers_state text not null,
    sprinklers_coverage text,
    occupants_day integer,
    occupants_night integer,
    occupants_asleep integer,
    occupants_need_help integer,
    detection_s real,
    call_s real,
    processing_s real,
    turnout_s real,
    travel_s real,
    setup_s real,
    primary key (agency_id, building_id)
) strict, without rowid;

-- A deleted building frees its reference.
create unique index buildings_by_reference on buildings (agency_id, reference)
where deleted_at_us is null and reference is not null;

-- Every revision whole, for ever: the document in the stored form `schema`.
create table building_revisions (
    agency_id text not null,
    building_id text not null,
    revision integer not null check (revision > 0),
    schema integer not null,
    document text not null,
    -- SHA-256 of the document, lower-case hexadecimal.
    digest text not null check (length(digest) = 64),
    actor text not null,
    at_us integer not null,
    primary key (agency_id, building_id, revision),
    foreign key (agency_id, building_id) references buildings (agency_id, building_id)
) strict;

create trigger building_revisions_stay before update on building_revisions
begin
    select raise(abort, 'a revision is never changed');
end;

-- The revision in which each room and opening last changed: its ETag. Not a
-- projection: it cannot be had from the document.
create table building_parts (
    agency_id text not null,
    building_id text not null,
    kind text not null check (kind in ('room', 'opening')),
    part_key text not null,
    revision integer not null,
    primary key (agency_id, building_id, kind, part_key),
    foreign key (agency_id, building_id) references buildings (agency_id, building_id)
) strict, without rowid;

create table rooms (
    agency_id text not null,
    building_id text not null,
    room_key text not null,
    name text not null,
    kind text not null,
    -- Key of the catalogue; null where the bureau gave the properties itself.
    room_use text,
    floor integer not null,
    -- Null for a shape given by area and perimeter.
    length_m real,
    width_m real,
    area_m2 real not null,
    perimeter_m real not null,
    height_m real not null,
    ceiling_form text not null,
    ceiling_high_m real,
    plan_x_m real,
    plan_y_m real,
    plan_turn_deg real,
    leakage_class text,
    leakage_area_m2 real,
    supply_m3_s real,
    extract_m3_s real,
    fans_stop_on_alarm integer,
    wall_material text,
    wall_thickness_m real,
    ceiling_material text,
    ceiling_thickness_m real,
    floor_material text,
    floor_thickness_m real,
    fuel_load_mj_m2 real,
    storage_commodity text,
    storage_height_m real,
    storage_footprint_m2 real,
    storage_aisle_m real,
    storage_racks integer,
    -- Words with a space between, in the order they were recorded.
    hazards text not null,
    detectors integer not null,
    sprinkler_class text,
    sprinkler_spacing_m real,
    primary key (agency_id, building_id, room_key),
    foreign key (agency_id, building_id) references buildings (agency_id, building_id)
) strict, without rowid;

create table openings (
    agency_id text not null,
    building_id text not null,
    opening_key text not null,
    name text not null,
    kind text not null,
    -- The two spaces in their recorded order; null is outside air.
    first_room_key text,
    second_room_key text,
    width_m real not null,
    height_m real not null,
    area_m2 real not null,
    sill_m real not null,
    open_fraction real not null,
    held_open integer not null,
    self_closing integer not null,
    fire_rating_min real,
    leakage_area_m2 real,
    swing text,
    entry integer not null,
    side text,
    azimuth_deg real,
    glazing text,
    primary key (agency_id, building_id, opening_key),
    foreign key (agency_id, building_id) references buildings (agency_id, building_id)
) strict, without rowid;

create table fuel_packages (
    agency_id text not null,
    building_id text not null,
    room_key text not null,
    package_key text not null,
    -- Key of the catalogue; null where the bureau gave the properties itself.
    item text,
    count integer not null,
    mass_kg real,
    base_height_m real not null,
    place text not null,
    spacing_m real,
    primary key (agency_id, building_id, room_key, package_key),
    foreign key (agency_id, building_id, room_key) references rooms (agency_id, building_id, room_key)
) strict, without rowid;

-- What happened, in order, to each agency's records.
create table changes (
    agency_id text not null references agencies (agency_id),
    sequence integer not null,
    kind text not null
    check (kind in ('building_created', 'building_changed', 'building_deleted', 'assessment_created')),
    building_id text not null,
    -- The building's revision after the change; the revision assessed, of an assessment.
    revision integer not null,
    -- The room or opening that was worked on, where only one was.
    part_kind text check (part_kind in ('room', 'opening')),
    part_key text,
    assessment_id text,
    actor text not null,
    at_us integer not null,
    primary key (agency_id, sequence)
) strict, without rowid;

-- Reports as they were served; never changed, never rendered again.
create table assessments (
    agency_id text not null,
    assessment_id text not null,
    building_id text not null,
    building_revision integer not null,
    level text not null,
    engine_version text not null,
    rating_rule integer not null,
    catalogue_digest text not null,
    input_digest text not null,
    -- The 64 bits of the seed; those from 2^63 on show as negative numbers.
    seed integer not null,
    -- As echoed in the report, JSON.
    assumptions text not null,
    created_at_us integer not null,
    created_by text not null,
    -- Projected from room_findings: the worst of each rating, and in which room.
    flashover_worst_rating text,
    flashover_worst_room_key text,
    backdraft_worst_rating text,
    backdraft_worst_room_key text,
    entry_worst_rating text,
    entry_worst_room_key text,
    report_bytes integer not null,
    report_gz blob not null,
    primary key (agency_id, assessment_id),
    foreign key (agency_id, building_id, building_revision)
    references building_revisions (agency_id, building_id, revision)
) strict;

create index assessments_by_building on assessments (agency_id, building_id, created_at_us, assessment_id);

create trigger assessments_stay before update on assessments
begin
    select raise(abort, 'an assessment is never changed');
end;

create table room_findings (
    agency_id text not null,
    assessment_id text not null,
    room_key text not null,
    building_id text not null,
    -- Place among the rooms of its building; 1 is the worst.
    sort_rank integer not null,
    -- Severity orders the ratings of one kind; the greatest is the worst.
    flashover_rating text not null,
    flashover_severity integer not null,
    flashover_scenario text,
    flashover_provisional integer not null,
    flashover_before_water integer,
    flashover_low_s real,
    flashover_typical_s real,
    flashover_high_s real,
    required_heat_release_kw real,
    available_heat_release_kw real,
    backdraft_rating text not null,
    backdraft_severity integer not null,
    backdraft_scenario text,
    backdraft_provisional integer not null,
    backdraft_outcome text not null,
    dangerous_from_s real,
    dangerous_until_s real,
    entry_rating text not null,
    entry_severity integer not null,
    entry_scenario text,
    entry_provisional integer not null,
    -- From opening the door to flashover.
    entry_low_s real,
    entry_typical_s real,
    entry_high_s real,
    primary key (agency_id, assessment_id, room_key),
    foreign key (agency_id, assessment_id) references assessments (agency_id, assessment_id)
) strict, without rowid;

create index room_findings_by_building on room_findings (agency_id, building_id);
