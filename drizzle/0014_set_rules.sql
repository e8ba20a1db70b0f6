-- Members pin material and combination sets as they pin templates: whoever asks who uses a revision is told of these too.
DROP FUNCTION uses_of_revision(uuid);--> statement-breakpoint
DROP FUNCTION members_by_id(uuid[]);--> statement-breakpoint
CREATE FUNCTION uses_of_revision(wanted uuid)
RETURNS TABLE (member_id uuid, job_id uuid, job_number text, job_name text, mark text, status text, owner_id uuid)
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
	SELECT m.id, j.id, j.number, j.name, m.mark, m.status, m.changed_by_id
	FROM member m
	JOIN job j ON j.practice_id = m.practice_id AND j.id = m.job_id
	LEFT JOIN section s ON s.practice_id = m.practice_id AND s.id = m.section_id
	WHERE m.practice_id = nullif(current_setting('app.practice_id', true), '')::uuid
		AND wanted IN (m.template_revision_id, m.criteria_revision_id, m.combination_revision_id, m.material_revision_id, s.revision_id)
	ORDER BY j.number, m.mark
$$;--> statement-breakpoint
CREATE FUNCTION members_by_id(wanted uuid[])
RETURNS TABLE (member_id uuid, job_id uuid, job_number text, job_name text, mark text, status text, owner_id uuid, pinned uuid[])
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
	SELECT m.id, j.id, j.number, j.name, m.mark, m.status, m.changed_by_id,
		array_remove(ARRAY[m.template_revision_id, m.criteria_revision_id, m.combination_revision_id, m.material_revision_id, s.revision_id], NULL)
	FROM member m
	JOIN job j ON j.practice_id = m.practice_id AND j.id = m.job_id
	LEFT JOIN section s ON s.practice_id = m.practice_id AND s.id = m.section_id
	WHERE m.practice_id = nullif(current_setting('app.practice_id', true), '')::uuid AND m.id = ANY (wanted)
	ORDER BY j.number, m.mark
$$;--> statement-breakpoint
REVOKE ALL ON FUNCTION uses_of_revision(uuid), members_by_id(uuid[]) FROM PUBLIC;--> statement-breakpoint
GRANT EXECUTE ON FUNCTION uses_of_revision(uuid), members_by_id(uuid[]) TO putlog_web;--> statement-breakpoint
GRANT CREATE ON SCHEMA public TO putlog_lookup;--> statement-breakpoint
ALTER FUNCTION uses_of_revision(uuid) OWNER TO putlog_lookup;--> statement-breakpoint
ALTER FUNCTION members_by_id(uuid[]) OWNER TO putlog_lookup;--> statement-breakpoint
REVOKE CREATE ON SCHEMA public FROM putlog_lookup;--> statement-breakpoint
GRANT UPDATE (material_revision_id, combination_revision_id) ON member TO putlog_web;
