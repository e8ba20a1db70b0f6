-- What the schema generator cannot say: forced policies, grants, lookups, and what is frozen for ever.

DO $$
DECLARE
	name regclass;
BEGIN
	FOR name IN SELECT oid FROM pg_class WHERE relnamespace = 'public'::regnamespace AND relkind = 'r' AND relrowsecurity LOOP
		EXECUTE format('ALTER TABLE %s FORCE ROW LEVEL SECURITY', name);
	END LOOP;
END $$;--> statement-breakpoint

REVOKE ALL ON SCHEMA public FROM PUBLIC;--> statement-breakpoint
GRANT USAGE ON SCHEMA public TO putlog_web, putlog_lookup;--> statement-breakpoint
GRANT USAGE ON SCHEMA drizzle TO putlog_web;--> statement-breakpoint
GRANT SELECT ON drizzle.__drizzle_migrations TO putlog_web;--> statement-breakpoint

GRANT SELECT ON practice, membership TO putlog_web;--> statement-breakpoint
GRANT SELECT, UPDATE (name, initials, unit_system) ON person TO putlog_web;--> statement-breakpoint
GRANT SELECT, UPDATE (password_hash, changed_at) ON credential TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, DELETE, UPDATE (last_seen_at) ON session TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, DELETE, UPDATE (last_used_at, revoked_at) ON api_token TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, DELETE ON sign_in_attempt TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE (name, reference) ON document TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON revision TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, DELETE ON section TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE (name, client, area, basis, unit_system, access, status, version, changed_at) ON job TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, DELETE ON job_person TO putlog_web;--> statement-breakpoint
-- Neither job nor mark: a mark that was on a drawing never comes to mean another beam.
GRANT SELECT, INSERT, UPDATE (title, purpose, template_revision_id, section_id, material, criteria_revision_id, parameters,
	settings, status, version, result, fingerprint, engine_version, evaluated_at, evaluated_by_id, changed_by_id, changed_at)
	ON member TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT ON audit_event TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON audit_check TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON process_beat TO putlog_web;--> statement-breakpoint

-- Lookups before the practice is known. Each answers for one exact secret or address, never with a list of people.
GRANT SELECT ON practice, person, credential, membership, session, api_token TO putlog_lookup;--> statement-breakpoint
CREATE POLICY practice_lookup ON practice FOR SELECT TO putlog_lookup USING (true);--> statement-breakpoint
CREATE POLICY person_lookup ON person FOR SELECT TO putlog_lookup USING (true);--> statement-breakpoint
CREATE POLICY credential_lookup ON credential FOR SELECT TO putlog_lookup USING (true);--> statement-breakpoint
CREATE POLICY membership_lookup ON membership FOR SELECT TO putlog_lookup USING (true);--> statement-breakpoint
CREATE POLICY session_lookup ON session FOR SELECT TO putlog_lookup USING (true);--> statement-breakpoint
CREATE POLICY api_token_lookup ON api_token FOR SELECT TO putlog_lookup USING (true);--> statement-breakpoint

CREATE FUNCTION find_session(wanted_hash text)
RETURNS TABLE (session_id uuid, practice_id uuid, practice_name text, person_id uuid, email text, name text, initials text,
	unit_system text, roles text[], created_at timestamptz, last_seen_at timestamptz, expires_at timestamptz)
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
	SELECT s.id, s.practice_id, c.name, p.id, p.email, p.name, p.initials, p.unit_system, m.roles, s.created_at, s.last_seen_at, s.expires_at
	FROM session s
	JOIN membership m ON m.practice_id = s.practice_id AND m.person_id = s.person_id AND m.active
	JOIN person p ON p.id = s.person_id
	JOIN practice c ON c.id = s.practice_id
	WHERE s.token_hash = wanted_hash AND s.expires_at > now()
$$;--> statement-breakpoint

CREATE FUNCTION find_api_token(wanted_hash text)
RETURNS TABLE (token_id uuid, practice_id uuid, practice_name text, person_id uuid, email text, name text, initials text,
	unit_system text, roles text[], last_used_at timestamptz)
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
	SELECT t.id, t.practice_id, c.name, p.id, p.email, p.name, p.initials, p.unit_system, m.roles, t.last_used_at
	FROM api_token t
	JOIN membership m ON m.practice_id = t.practice_id AND m.person_id = t.person_id AND m.active
	JOIN person p ON p.id = t.person_id
	JOIN practice c ON c.id = t.practice_id
	WHERE t.token_hash = wanted_hash AND t.revoked_at IS NULL AND (t.expires_at IS NULL OR t.expires_at > now())
$$;--> statement-breakpoint

-- A person with several practices has several rows.
CREATE FUNCTION find_sign_in(wanted_email text)
RETURNS TABLE (practice_id uuid, practice_name text, person_id uuid, name text, password_hash text, roles text[])
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
	SELECT m.practice_id, c.name, p.id, p.name, k.password_hash, m.roles
	FROM person p
	JOIN credential k ON k.person_id = p.id
	JOIN membership m ON m.person_id = p.id AND m.active
	JOIN practice c ON c.id = m.practice_id
	WHERE p.email = lower(trim(wanted_email))
	ORDER BY c.name
$$;--> statement-breakpoint

-- For tasks that go round the practices one after the other, each under its own policies.
CREATE FUNCTION practice_ids() RETURNS SETOF uuid
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$ SELECT id FROM practice ORDER BY id $$;--> statement-breakpoint

REVOKE ALL ON FUNCTION find_session(text), find_api_token(text), find_sign_in(text), practice_ids() FROM PUBLIC;--> statement-breakpoint
GRANT EXECUTE ON FUNCTION find_session(text), find_api_token(text), find_sign_in(text), practice_ids() TO putlog_web;--> statement-breakpoint
-- A function's new owner must be able to create in its schema, at the moment of the change.
GRANT CREATE ON SCHEMA public TO putlog_lookup;--> statement-breakpoint
ALTER FUNCTION find_session(text) OWNER TO putlog_lookup;--> statement-breakpoint
ALTER FUNCTION find_api_token(text) OWNER TO putlog_lookup;--> statement-breakpoint
ALTER FUNCTION find_sign_in(text) OWNER TO putlog_lookup;--> statement-breakpoint
ALTER FUNCTION practice_ids() OWNER TO putlog_lookup;--> statement-breakpoint
REVOKE CREATE ON SCHEMA public FROM putlog_lookup;--> statement-breakpoint

-- The legal moves are those of REVISION_STEPS (features/review/review.ts); a test compares the two.
CREATE FUNCTION revision_guard() RETURNS trigger LANGUAGE plpgsql AS $$
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
		WHEN 'draft>draft' THEN ARRAY['body', 'schema_version', 'engine_version', 'sha256', 'change_note', 'change_class', 'consequence']
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
CREATE TRIGGER revision_guard BEFORE INSERT OR UPDATE OR DELETE ON revision
	FOR EACH ROW EXECUTE FUNCTION revision_guard();--> statement-breakpoint

-- FOR SHARE: while rows are written, nobody can submit the edition they belong to.
CREATE FUNCTION section_guard() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE
	edition record;
BEGIN
	FOR edition IN SELECT DISTINCT r.practice_id, r.revision_id FROM
		(VALUES (NEW.practice_id, NEW.revision_id), (OLD.practice_id, OLD.revision_id)) AS r (practice_id, revision_id)
		WHERE r.revision_id IS NOT NULL LOOP
		PERFORM FROM revision WHERE practice_id = edition.practice_id AND id = edition.revision_id AND state = 'draft' FOR SHARE;
		IF NOT FOUND THEN
			RAISE EXCEPTION 'the sections of edition % are frozen', edition.revision_id USING ERRCODE = 'PL001';
		END IF;
	END LOOP;
	RETURN coalesce(NEW, OLD);
END $$;--> statement-breakpoint
CREATE TRIGGER section_guard BEFORE INSERT OR UPDATE OR DELETE ON section
	FOR EACH ROW EXECUTE FUNCTION section_guard();--> statement-breakpoint

-- The end of the practice's chain, held until the transaction ends. The lock comes first: the row is read after it.
CREATE FUNCTION audit_head(OUT sequence bigint, OUT hash text) LANGUAGE plpgsql AS $$
DECLARE
	practice uuid := current_setting('app.practice_id')::uuid;
BEGIN
	PERFORM pg_advisory_xact_lock(hashtextextended('audit ' || practice, 0));
	SELECT e.sequence, e.hash INTO sequence, hash FROM audit_event e WHERE e.practice_id = practice ORDER BY e.sequence DESC LIMIT 1;
	sequence := coalesce(sequence, 0);
	hash := coalesce(hash, repeat('0', 64));
END $$;--> statement-breakpoint

CREATE FUNCTION audit_event_append() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE
	head record;
BEGIN
	SELECT sequence, hash INTO head FROM audit_event WHERE practice_id = NEW.practice_id ORDER BY sequence DESC LIMIT 1;
	IF NEW.sequence <> coalesce(head.sequence, 0) + 1 OR NEW.previous_hash <> coalesce(head.hash, repeat('0', 64)) THEN
		RAISE EXCEPTION 'audit event % does not follow event %', NEW.sequence, coalesce(head.sequence, 0) USING ERRCODE = 'PL003';
	END IF;
	RETURN NEW;
END $$;--> statement-breakpoint
CREATE FUNCTION audit_event_frozen() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
	RAISE EXCEPTION 'audit events are never changed or removed' USING ERRCODE = 'PL001';
END $$;--> statement-breakpoint
CREATE TRIGGER audit_event_append BEFORE INSERT ON audit_event FOR EACH ROW EXECUTE FUNCTION audit_event_append();--> statement-breakpoint
CREATE TRIGGER audit_event_frozen BEFORE UPDATE OR DELETE ON audit_event FOR EACH ROW EXECUTE FUNCTION audit_event_frozen();--> statement-breakpoint
CREATE TRIGGER audit_event_not_emptied BEFORE TRUNCATE ON audit_event FOR EACH STATEMENT EXECUTE FUNCTION audit_event_frozen();
