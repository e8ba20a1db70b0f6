-- A draft keeps who changed it and may be laid aside. Everything else as before; the legal moves are those of REVISION_STEPS.
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
		WHEN 'draft>draft' THEN ARRAY['body', 'schema_version', 'engine_version', 'sha256', 'version', 'editor_ids', 'change_note',
			'change_class', 'consequence', 'abandoned_at']
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

-- Members by their ids, jobs for named people included: what a recall lists, whatever they pin by now. Nothing of the loads.
CREATE FUNCTION members_by_id(wanted uuid[])
RETURNS TABLE (member_id uuid, job_id uuid, job_number text, job_name text, mark text, status text, owner_id uuid, pinned uuid[])
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
	SELECT m.id, j.id, j.number, j.name, m.mark, m.status, m.changed_by_id,
		array_remove(ARRAY[m.template_revision_id, m.criteria_revision_id, s.revision_id], NULL)
	FROM member m
	JOIN job j ON j.practice_id = m.practice_id AND j.id = m.job_id
	LEFT JOIN section s ON s.practice_id = m.practice_id AND s.id = m.section_id
	WHERE m.practice_id = nullif(current_setting('app.practice_id', true), '')::uuid AND m.id = ANY (wanted)
	ORDER BY j.number, m.mark
$$;--> statement-breakpoint
REVOKE ALL ON FUNCTION members_by_id(uuid[]) FROM PUBLIC;--> statement-breakpoint
GRANT EXECUTE ON FUNCTION members_by_id(uuid[]) TO putlog_web;--> statement-breakpoint
GRANT CREATE ON SCHEMA public TO putlog_lookup;--> statement-breakpoint
ALTER FUNCTION members_by_id(uuid[]) OWNER TO putlog_lookup;--> statement-breakpoint
REVOKE CREATE ON SCHEMA public FROM putlog_lookup;
