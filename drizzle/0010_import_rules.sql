-- What the schema generator cannot say of imports: forced policies, grants, what is frozen, and statistics that are fresh.

ALTER TABLE section_import FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE import_acceptance FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE import_mapping FORCE ROW LEVEL SECURITY;--> statement-breakpoint

GRANT SELECT, INSERT, UPDATE (state, source_key, source_name, source_sha256, about, mapping, edits, fixes, phase, done, total, facts,
	report, error, version, revision_id, changed_at, finished_at) ON section_import TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, DELETE ON import_acceptance TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE (mapping, about, person_id, used_at) ON import_mapping TO putlog_web;--> statement-breakpoint

-- The report of an edition stays as it was when its rows were written.
CREATE FUNCTION section_import_guard() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
	IF TG_OP = 'DELETE' THEN
		RAISE EXCEPTION 'import % cannot be deleted', OLD.id USING ERRCODE = 'PL001';
	END IF;
	IF OLD.state IN ('committed', 'cancelled') THEN
		RAISE EXCEPTION 'import % is frozen (%)', OLD.id, OLD.state USING ERRCODE = 'PL001';
	END IF;
	RETURN NEW;
END $$;--> statement-breakpoint
CREATE TRIGGER section_import_guard BEFORE UPDATE OR DELETE ON section_import
	FOR EACH ROW EXECUTE FUNCTION section_import_guard();--> statement-breakpoint
CREATE FUNCTION import_acceptance_guard() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE
	of record := coalesce(NEW, OLD);
BEGIN
	PERFORM FROM section_import WHERE practice_id = of.practice_id AND id = of.import_id AND state NOT IN ('committed', 'cancelled') FOR SHARE;
	IF NOT FOUND THEN
		RAISE EXCEPTION 'the report of import % is frozen', of.import_id USING ERRCODE = 'PL001';
	END IF;
	RETURN of;
END $$;--> statement-breakpoint
CREATE TRIGGER import_acceptance_guard BEFORE INSERT OR UPDATE OR DELETE ON import_acceptance
	FOR EACH ROW EXECUTE FUNCTION import_acceptance_guard();--> statement-breakpoint

-- As before, once for a statement: an edition of 100,000 rows is written in a few of them. FOR SHARE: while rows are
-- written, nobody can submit the edition they belong to.
DROP TRIGGER section_guard ON section;--> statement-breakpoint
DROP FUNCTION section_guard();--> statement-breakpoint
CREATE FUNCTION require_draft_edition(of_practice uuid, of_revision uuid) RETURNS void LANGUAGE plpgsql AS $$
BEGIN
	PERFORM FROM revision WHERE practice_id = of_practice AND id = of_revision AND state = 'draft' FOR SHARE;
	IF NOT FOUND THEN
		RAISE EXCEPTION 'the sections of edition % are frozen', of_revision USING ERRCODE = 'PL001';
	END IF;
END $$;--> statement-breakpoint
CREATE FUNCTION section_guard() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
	IF TG_OP <> 'DELETE' THEN
		PERFORM require_draft_edition(r.practice_id, r.revision_id) FROM (SELECT DISTINCT practice_id, revision_id FROM new_rows) AS r;
	END IF;
	IF TG_OP <> 'INSERT' THEN
		PERFORM require_draft_edition(r.practice_id, r.revision_id) FROM (SELECT DISTINCT practice_id, revision_id FROM old_rows) AS r;
	END IF;
	RETURN NULL;
END $$;--> statement-breakpoint
CREATE TRIGGER section_guard_insert AFTER INSERT ON section REFERENCING NEW TABLE AS new_rows
	FOR EACH STATEMENT EXECUTE FUNCTION section_guard();--> statement-breakpoint
CREATE TRIGGER section_guard_update AFTER UPDATE ON section REFERENCING NEW TABLE AS new_rows OLD TABLE AS old_rows
	FOR EACH STATEMENT EXECUTE FUNCTION section_guard();--> statement-breakpoint
CREATE TRIGGER section_guard_delete AFTER DELETE ON section REFERENCING OLD TABLE AS old_rows
	FOR EACH STATEMENT EXECUTE FUNCTION section_guard();--> statement-breakpoint

-- Only the table's owner may have it counted anew; web and worker may ask for this, and for nothing else of his.
CREATE FUNCTION refresh_section_statistics() RETURNS void LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
BEGIN
	ANALYZE section;
END $$;--> statement-breakpoint
REVOKE ALL ON FUNCTION refresh_section_statistics() FROM PUBLIC;--> statement-breakpoint
GRANT EXECUTE ON FUNCTION refresh_section_statistics() TO putlog_web;
