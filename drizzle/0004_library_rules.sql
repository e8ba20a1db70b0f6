-- What the schema generator cannot say of the library's tables: forced policies, grants, what is frozen, who sees every use.

DO $$
DECLARE
	name regclass;
BEGIN
	FOR name IN SELECT oid FROM pg_class WHERE relnamespace = 'public'::regnamespace AND relkind = 'r' AND relrowsecurity AND NOT relforcerowsecurity LOOP
		EXECUTE format('ALTER TABLE %s FORCE ROW LEVEL SECURITY', name);
	END LOOP;
END $$;--> statement-breakpoint

GRANT UPDATE (name, reference, review_by, grace_days, derived_from_id) ON document TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE (resolved_at, resolved_by_id) ON revision_comment TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT ON revision_confirmation TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE (state, done, total, passed, report, error, finished_at) ON proof_run TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE (state, done, total, error, finished_at) ON impact_run TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE (flips, largest_change, report) ON impact_member TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE (closed_by_id, closed_at) ON recall TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE (owner_id, decision, note, decided_by_id, decided_at) ON recall_use TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, DELETE ON watch TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE (state, answer, version, handled_by_id, changed_at, document_id) ON request TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE (read_at) ON notice TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE (state, attempts, error, due_at, sent_at) ON mail TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE (mode), DELETE ON notice_preference TO putlog_web;--> statement-breakpoint

-- A draft counts its edits. Everything else as before; the legal moves are those of REVISION_STEPS, and a test compares the two.
CREATE OR REPLACE FUNCTION revision_guard() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE
	free text[];
BEGIN
	IF TG_OP = 'DELETE' THEN
		RAISE EXCEPTION 'revision % cannot be deleted', OLD.id USING ERRCODE = 'PL001';
	END IF;
	IF TG_OP = 'INSERT' THEN
		IF NEW.state <> 'draft' THEN
			RAISE EXCEPTION 'a revision starts as a draft, not %', NEW.state USING ERRCODE = 'PL002';
		END IF;
		RETURN NEW;
	END IF;
	free := CASE OLD.state || '>' || NEW.state
		WHEN 'draft>draft' THEN ARRAY['body', 'schema_version', 'engine_version', 'sha256', 'version', 'change_note', 'change_class', 'consequence']
		WHEN 'draft>in_review' THEN ARRAY['state', 'submitted_at']
		WHEN 'in_review>draft' THEN ARRAY['state', 'submitted_at']
		WHEN 'in_review>issued' THEN ARRAY['state', 'reviewer_id', 'issued_at']
		WHEN 'issued>superseded' THEN ARRAY['state', 'superseded_at']
		WHEN 'issued>withdrawn' THEN ARRAY['state', 'withdrawn_at', 'withdrawn_by_id', 'withdrawal_reason', 'withdrawal_severity']
		WHEN 'superseded>withdrawn' THEN ARRAY['state', 'withdrawn_at', 'withdrawn_by_id', 'withdrawal_reason', 'withdrawal_severity']
		ELSE '{}' END;
	IF OLD.state <> NEW.state AND free = '{}' THEN
		RAISE EXCEPTION 'revision % cannot go from % to %', OLD.id, OLD.state, NEW.state USING ERRCODE = 'PL002';
	END IF;
	IF to_jsonb(OLD) - free IS DISTINCT FROM to_jsonb(NEW) - free THEN
		RAISE EXCEPTION 'revision % is frozen (%)', OLD.id, OLD.state USING ERRCODE = 'PL001';
	END IF;
	RETURN NEW;
END $$;--> statement-breakpoint

-- Who uses a revision, jobs for named people included: the librarian learns mark and owner and nothing of the loads; the
-- worker reads the members themselves one by one as their owners.
GRANT SELECT ON member, job, section TO putlog_lookup;--> statement-breakpoint
CREATE POLICY member_lookup ON member FOR SELECT TO putlog_lookup USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY job_lookup ON job FOR SELECT TO putlog_lookup USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY section_lookup ON section FOR SELECT TO putlog_lookup USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE FUNCTION uses_of_revision(wanted uuid)
RETURNS TABLE (member_id uuid, job_id uuid, job_number text, job_name text, mark text, status text, owner_id uuid)
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
	SELECT m.id, j.id, j.number, j.name, m.mark, m.status, m.changed_by_id
	FROM member m
	JOIN job j ON j.practice_id = m.practice_id AND j.id = m.job_id
	LEFT JOIN section s ON s.practice_id = m.practice_id AND s.id = m.section_id
	WHERE m.practice_id = nullif(current_setting('app.practice_id', true), '')::uuid
		AND wanted IN (m.template_revision_id, m.criteria_revision_id, s.revision_id)
	ORDER BY j.number, m.mark
$$;--> statement-breakpoint
REVOKE ALL ON FUNCTION uses_of_revision(uuid) FROM PUBLIC;--> statement-breakpoint
GRANT EXECUTE ON FUNCTION uses_of_revision(uuid) TO putlog_web;--> statement-breakpoint
GRANT CREATE ON SCHEMA public TO putlog_lookup;--> statement-breakpoint
ALTER FUNCTION uses_of_revision(uuid) OWNER TO putlog_lookup;--> statement-breakpoint
REVOKE CREATE ON SCHEMA public FROM putlog_lookup;
