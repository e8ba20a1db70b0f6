-- What the schema generator cannot say of the search: forced policies, grants, how entries are written, and how they are found.

ALTER TABLE search_entry FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE search_word FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON search_entry TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT ON search_word TO putlog_web;--> statement-breakpoint

-- Words as features/search/words.ts makes them of what is typed: lower case, without accents, cut at every other character.
CREATE FUNCTION search_words(said text) RETURNS text[] LANGUAGE sql IMMUTABLE PARALLEL SAFE AS $$
	SELECT coalesce(array_agg(DISTINCT left(word, 60)), '{}')
	FROM regexp_split_to_table(regexp_replace(lower(normalize(coalesce(said, ''), NFKD)), '[\u0300-\u036f]', '', 'g'),
		'[\u0001-\u002f\u003a-\u0040\u005b-\u0060\u007b-\u00bf\u00d7\u00f7\u2000-\u206f\u2190-\u2bff]+') AS word
	WHERE word <> ''
$$;--> statement-breakpoint
CREATE FUNCTION search_key(said text) RETURNS text LANGUAGE sql IMMUTABLE PARALLEL SAFE AS $$
	SELECT regexp_replace(lower(normalize(coalesce(said, ''), NFKD)),
		'[\u0001-\u002f\u003a-\u0040\u005b-\u0060\u007b-\u00bf\u00d7\u00f7\u0300-\u036f\u2000-\u206f\u2190-\u2bff]', '', 'g')
$$;--> statement-breakpoint

-- Writes an entry. `named` are further names, `said` everything else that finds it.
CREATE FUNCTION search_put(e search_entry, named text, said text) RETURNS void LANGUAGE plpgsql AS $$
DECLARE
	names text[] := search_words(concat_ws(' ', e.mark, e.title, named)) || array_remove(ARRAY[search_key(e.mark)], '');
	words text[] := names || search_words(concat_ws(' ', e.detail, e.state, e.body, said));
BEGIN
	e.mark_key := search_key(e.mark);
	e.names := array_to_tsvector(names);
	e.words := array_to_tsvector(words);
	INSERT INTO search_entry SELECT e.*
	ON CONFLICT (practice_id, kind, id) DO UPDATE SET
		(mark, mark_key, title, detail, state, standing, place, body, names, words, job_id, reader_id, person_id, changed_at) =
		(excluded.mark, excluded.mark_key, excluded.title, excluded.detail, excluded.state, excluded.standing, excluded.place, excluded.body,
			excluded.names, excluded.words, excluded.job_id, excluded.reader_id, excluded.person_id, excluded.changed_at);
	INSERT INTO search_word (practice_id, word)
	SELECT DISTINCT e.practice_id, w FROM unnest(words) AS w
	WHERE w ~ '^[^0-9]{4,}$' AND NOT EXISTS (SELECT FROM search_word s WHERE s.practice_id = e.practice_id AND s.word = w);
END $$;--> statement-breakpoint

CREATE FUNCTION search_put_job(j job) RETURNS void LANGUAGE plpgsql AS $$
DECLARE
	e search_entry;
BEGIN
	e.practice_id := j.practice_id; e.kind := 'job'; e.id := j.id; e.job_id := j.id;
	e.mark := j.number; e.title := j.name; e.detail := concat_ws(', ', nullif(j.client, ''), nullif(j.area, ''));
	e.state := j.status; e.standing := CASE j.status WHEN 'closed' THEN 2 ELSE 0 END;
	e.place := ARRAY[j.number]; e.body := ''; e.person_id := j.created_by_id; e.changed_at := j.changed_at;
	PERFORM search_put(e, '', concat_ws(' ', j.basis, (SELECT name FROM person WHERE id = j.created_by_id)));
END $$;--> statement-breakpoint

CREATE FUNCTION search_put_member(m member) RETURNS void LANGUAGE plpgsql AS $$
DECLARE
	e search_entry;
	of_job record;
	made_of record;
	by_template record;
BEGIN
	SELECT number, name INTO of_job FROM job WHERE practice_id = m.practice_id AND id = m.job_id;
	SELECT designation, concat_ws(' ', designation, search_key(designation_key), search_key(regexp_replace(designation_key, '^[a-z]+', ''))) AS said
		INTO made_of FROM section WHERE practice_id = m.practice_id AND id = m.section_id;
	SELECT concat_ws(' ', d.reference, d.name, r.body ->> 'arrangement') AS said INTO by_template
		FROM revision r JOIN document d ON d.practice_id = r.practice_id AND d.id = r.document_id
		WHERE r.practice_id = m.practice_id AND r.id = m.template_revision_id;
	e.practice_id := m.practice_id; e.kind := 'member'; e.id := m.id; e.job_id := m.job_id;
	e.mark := m.mark; e.title := m.title;
	e.detail := concat_ws(', ', concat_ws(' ', of_job.number, of_job.name), made_of.designation);
	e.state := m.status; e.standing := CASE m.status WHEN 'removed' THEN 3 ELSE 0 END;
	e.place := ARRAY[of_job.number, m.mark]; e.body := ''; e.person_id := m.changed_by_id; e.changed_at := m.changed_at;
	PERFORM search_put(e, concat_ws(' ', of_job.number, search_key(of_job.number)), concat_ws(' ', m.purpose, m.material, made_of.said,
		by_template.said, (SELECT name FROM person WHERE id = m.changed_by_id)));
END $$;--> statement-breakpoint

-- A document by the revision that stands for it: the issued one, else the newest. What it says besides its names: a template
-- by the texts that a person reads, another kind by all of its texts.
CREATE FUNCTION search_put_document(d document) RETURNS void LANGUAGE plpgsql AS $$
DECLARE
	e search_entry;
	r revision;
	paths jsonpath[];
	said text;
BEGIN
	SELECT * INTO r FROM revision WHERE practice_id = d.practice_id AND document_id = d.id
		ORDER BY state = 'issued' DESC, abandoned_at IS NULL DESC, number DESC LIMIT 1;
	IF NOT FOUND THEN
		RETURN;
	END IF;
	paths := CASE d.kind WHEN 'template' THEN ARRAY['$.arrangement', '$.load_kinds[*]', '$.tags[*]', '$.summary', '$.you_give', '$.you_get',
		'$.use[*]', '$.do_not_use[*]', '$.parameters[*].symbol', '$.parameters[*].name', '$.parameters[*].help', '$.derived[*].name',
		'$.rules[*].title', '$.rules[*].message', '$.results[*].name', '$.sources[*].*']
		ELSE ARRAY['strict $.** ? (@.type() == "string")'] END;
	SELECT string_agg(v #>> '{}', ' ') INTO said FROM unnest(paths) AS p, jsonb_path_query(r.body, p) AS v WHERE jsonb_typeof(v) = 'string';
	e.practice_id := d.practice_id; e.kind := CASE d.kind WHEN 'template' THEN 'template' ELSE 'document' END; e.id := d.id;
	e.mark := d.reference; e.title := d.name;
	e.detail := coalesce(r.body ->> 'summary', ''); e.state := r.state;
	e.standing := CASE r.state WHEN 'issued' THEN 0 WHEN 'superseded' THEN 2 WHEN 'withdrawn' THEN 3 ELSE 1 END;
	e.place := ARRAY[d.kind::text, d.slug]; e.body := ''; e.person_id := r.author_id;
	e.changed_at := coalesce(r.withdrawn_at, r.superseded_at, r.issued_at, r.submitted_at, r.created_at);
	PERFORM search_put(e, '', concat_ws(' ', replace(d.kind::text, '-', ' '), d.slug, said,
		(SELECT string_agg(name, ' ') FROM person WHERE id IN (r.author_id, r.reviewer_id))));
	e.kind := 'note'; e.mark := ''; e.title := format('Method of %s, %s', d.reference, d.name); e.detail := '';
	e.place := ARRAY['method', d.kind::text, d.slug, r.number::text]; e.body := coalesce(r.body ->> 'method', '');
	PERFORM search_put_note(e);
END $$;--> statement-breakpoint

CREATE FUNCTION search_put_change(r revision) RETURNS void LANGUAGE plpgsql AS $$
DECLARE
	e search_entry;
	d document;
BEGIN
	SELECT * INTO d FROM document WHERE practice_id = r.practice_id AND id = r.document_id;
	e.practice_id := r.practice_id; e.kind := 'note'; e.id := r.id; e.mark := '';
	e.title := format('Change note of %s, %s %s', d.reference, CASE d.kind WHEN 'section-table' THEN 'edition' ELSE 'revision' END, r.number);
	e.detail := ''; e.state := r.state;
	e.standing := CASE r.state WHEN 'issued' THEN 0 WHEN 'superseded' THEN 2 WHEN 'withdrawn' THEN 3 ELSE 1 END;
	e.place := ARRAY['change', d.kind::text, d.slug, r.number::text];
	e.body := CASE WHEN r.abandoned_at IS NULL THEN concat_ws(' ', r.change_note, r.withdrawal_reason) ELSE '' END;
	e.person_id := r.author_id; e.changed_at := coalesce(r.withdrawn_at, r.issued_at, r.created_at);
	PERFORM search_put_note(e);
END $$;--> statement-breakpoint

CREATE FUNCTION search_put_comment(c revision_comment) RETURNS void LANGUAGE plpgsql AS $$
DECLARE
	e search_entry;
	of record;
BEGIN
	SELECT d.kind, d.slug, d.reference, r.number INTO of FROM revision r JOIN document d ON d.practice_id = r.practice_id AND d.id = r.document_id
		WHERE r.practice_id = c.practice_id AND r.id = c.revision_id;
	e.practice_id := c.practice_id; e.kind := 'note'; e.id := c.id; e.mark := '';
	e.title := format('Comment on %s, %s %s', of.reference, CASE of.kind WHEN 'section-table' THEN 'edition' ELSE 'revision' END, of.number);
	e.detail := (SELECT name FROM person WHERE id = c.author_id);
	e.state := CASE WHEN c.resolved_at IS NULL THEN '' ELSE 'resolved' END; e.standing := CASE WHEN c.resolved_at IS NULL THEN 0 ELSE 2 END;
	e.place := ARRAY['comment', of.kind::text, of.slug, of.number::text]; e.body := c.body;
	e.person_id := c.author_id; e.changed_at := c.created_at;
	PERFORM search_put_note(e);
END $$;--> statement-breakpoint

CREATE FUNCTION search_put_request(q request) RETURNS void LANGUAGE plpgsql AS $$
DECLARE
	e search_entry;
BEGIN
	e.practice_id := q.practice_id; e.kind := 'note'; e.id := q.id; e.reader_id := q.raised_by_id;
	e.mark := initcap(q.kind) || ' ' || q.number; e.title := q.title;
	e.detail := (SELECT name FROM person WHERE id = q.raised_by_id);
	e.state := q.state; e.standing := CASE WHEN q.state IN ('open', 'accepted') THEN 0 ELSE 2 END;
	e.place := ARRAY['request', q.number::text]; e.body := concat_ws(E'\n', nullif(q.body, ''), nullif(q.answer, ''));
	e.person_id := q.raised_by_id; e.changed_at := q.changed_at;
	PERFORM search_put_note(e);
END $$;--> statement-breakpoint

-- A note without words is no note; a request says something in its title.
CREATE FUNCTION search_put_note(e search_entry) RETURNS void LANGUAGE plpgsql AS $$
BEGIN
	IF e.body <> '' OR e.place[1] = 'request' THEN
		PERFORM search_put(e, '', '');
	ELSE
		DELETE FROM search_entry WHERE practice_id = e.practice_id AND kind = 'note' AND id = e.id;
	END IF;
END $$;--> statement-breakpoint

CREATE FUNCTION search_put_person(m membership) RETURNS void LANGUAGE plpgsql AS $$
DECLARE
	e search_entry;
	p person;
BEGIN
	SELECT * INTO p FROM person WHERE id = m.person_id;
	IF NOT FOUND OR NOT m.active THEN
		DELETE FROM search_entry WHERE practice_id = m.practice_id AND kind = 'person' AND id = m.person_id;
		RETURN;
	END IF;
	e.practice_id := m.practice_id; e.kind := 'person'; e.id := p.id; e.person_id := p.id;
	e.mark := p.initials; e.title := p.name; e.detail := coalesce(nullif(m.title, ''), array_to_string(m.roles, ', '));
	e.state := ''; e.standing := 0; e.place := ARRAY[p.name]; e.body := ''; e.changed_at := m.created_at;
	PERFORM search_put(e, '', concat_ws(' ', array_to_string(m.roles, ' '), p.email));
END $$;--> statement-breakpoint

-- One for every table: which entry a changed row is of, and which others say its words.
CREATE FUNCTION search_follow() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE
	practice uuid := nullif(current_setting('app.practice_id', true), '')::uuid;
BEGIN
	CASE TG_TABLE_NAME
	WHEN 'job' THEN
		PERFORM search_put_job(NEW);
		IF TG_OP = 'UPDATE' AND OLD.name <> NEW.name THEN
			PERFORM search_put_member(m) FROM member m WHERE m.practice_id = NEW.practice_id AND m.job_id = NEW.id;
		END IF;
	WHEN 'member' THEN
		PERFORM search_put_member(NEW);
	WHEN 'document' THEN
		PERFORM search_put_document(NEW);
		PERFORM search_put_change(r) FROM revision r WHERE r.practice_id = NEW.practice_id AND r.document_id = NEW.id;
	WHEN 'revision' THEN
		PERFORM search_put_document(d) FROM document d WHERE d.practice_id = NEW.practice_id AND d.id = NEW.document_id;
		PERFORM search_put_change(NEW);
	WHEN 'revision_comment' THEN
		PERFORM search_put_comment(NEW);
	WHEN 'request' THEN
		PERFORM search_put_request(NEW);
	WHEN 'membership' THEN
		PERFORM search_put_person(NEW);
	WHEN 'person' THEN
		PERFORM search_put_person(m) FROM membership m WHERE m.practice_id = practice AND m.person_id = NEW.id;
		PERFORM search_put_job(j) FROM job j WHERE j.practice_id = practice AND j.created_by_id = NEW.id;
		PERFORM search_put_member(m) FROM member m WHERE m.practice_id = practice AND m.changed_by_id = NEW.id;
	END CASE;
	RETURN NULL;
END $$;--> statement-breakpoint
CREATE TRIGGER search_follow_new AFTER INSERT ON job FOR EACH ROW EXECUTE FUNCTION search_follow();--> statement-breakpoint
CREATE TRIGGER search_follow AFTER UPDATE ON job FOR EACH ROW
	WHEN ((OLD.name, OLD.client, OLD.area, OLD.basis, OLD.status) IS DISTINCT FROM (NEW.name, NEW.client, NEW.area, NEW.basis, NEW.status))
	EXECUTE FUNCTION search_follow();--> statement-breakpoint
CREATE TRIGGER search_follow_new AFTER INSERT ON member FOR EACH ROW EXECUTE FUNCTION search_follow();--> statement-breakpoint
CREATE TRIGGER search_follow AFTER UPDATE ON member FOR EACH ROW
	WHEN ((OLD.title, OLD.purpose, OLD.material, OLD.section_id, OLD.template_revision_id, OLD.status, OLD.changed_by_id, OLD.changed_at)
		IS DISTINCT FROM (NEW.title, NEW.purpose, NEW.material, NEW.section_id, NEW.template_revision_id, NEW.status, NEW.changed_by_id, NEW.changed_at))
	EXECUTE FUNCTION search_follow();--> statement-breakpoint
CREATE TRIGGER search_follow AFTER UPDATE ON document FOR EACH ROW
	WHEN ((OLD.name, OLD.reference) IS DISTINCT FROM (NEW.name, NEW.reference)) EXECUTE FUNCTION search_follow();--> statement-breakpoint
CREATE TRIGGER search_follow AFTER INSERT OR UPDATE ON revision FOR EACH ROW EXECUTE FUNCTION search_follow();--> statement-breakpoint
CREATE TRIGGER search_follow AFTER INSERT OR UPDATE ON revision_comment FOR EACH ROW EXECUTE FUNCTION search_follow();--> statement-breakpoint
CREATE TRIGGER search_follow AFTER INSERT OR UPDATE ON request FOR EACH ROW EXECUTE FUNCTION search_follow();--> statement-breakpoint
CREATE TRIGGER search_follow AFTER INSERT OR UPDATE ON membership FOR EACH ROW EXECUTE FUNCTION search_follow();--> statement-breakpoint
CREATE TRIGGER search_follow AFTER UPDATE ON person FOR EACH ROW
	WHEN ((OLD.name, OLD.initials) IS DISTINCT FROM (NEW.name, NEW.initials)) EXECUTE FUNCTION search_follow();--> statement-breakpoint

-- Which entries of the practice answer, and how well (GRADES of features/search/search.ts): by the index, which no query of web's own
-- may use. Keys and nothing that an entry says: whoever asks leaves out the jobs and requests that he may not see, and reads the entries
-- themselves under their own policy.
GRANT SELECT ON search_entry TO putlog_lookup;--> statement-breakpoint
CREATE POLICY search_entry_lookup ON search_entry FOR SELECT TO putlog_lookup USING (true);--> statement-breakpoint
CREATE FUNCTION search_matches(asked tsquery, named tsquery, mark text, title text)
RETURNS TABLE (kind text, id uuid, job_id uuid, reader_id uuid, person_id uuid, standing smallint, changed_at timestamptz, grade smallint)
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
	SELECT e.kind, e.id, e.job_id, e.reader_id, e.person_id, e.standing, e.changed_at,
		CASE WHEN e.mark_key = search_matches.mark THEN 0
			WHEN search_matches.mark <> '' AND starts_with(e.mark_key, search_matches.mark) THEN 1
			WHEN NOT e.names @@ named THEN 4
			WHEN starts_with(lower(e.title), search_matches.title) THEN 2
			ELSE 3 END::smallint
	FROM search_entry e
	WHERE e.practice_id = nullif(current_setting('app.practice_id', true), '')::uuid AND e.words @@ asked
$$;--> statement-breakpoint
REVOKE ALL ON FUNCTION search_matches(tsquery, tsquery, text, text) FROM PUBLIC;--> statement-breakpoint
GRANT EXECUTE ON FUNCTION search_matches(tsquery, tsquery, text, text) TO putlog_web;--> statement-breakpoint
GRANT CREATE ON SCHEMA public TO putlog_lookup;--> statement-breakpoint
ALTER FUNCTION search_matches(tsquery, tsquery, text, text) OWNER TO putlog_lookup;--> statement-breakpoint
REVOKE CREATE ON SCHEMA public FROM putlog_lookup;--> statement-breakpoint

-- Entries of what is there already. The owner of the tables is no superuser everywhere: for this transaction his own tables are open to him.
DO $$
DECLARE
	forced regclass[] := ARRAY(SELECT oid FROM pg_class WHERE relnamespace = 'public'::regnamespace AND relkind = 'r' AND relforcerowsecurity);
	name regclass;
BEGIN
	FOREACH name IN ARRAY forced LOOP
		EXECUTE format('ALTER TABLE %s NO FORCE ROW LEVEL SECURITY', name);
	END LOOP;
	PERFORM search_put_person(m) FROM membership m;
	PERFORM search_put_job(j) FROM job j;
	PERFORM search_put_member(m) FROM member m;
	PERFORM search_put_document(d) FROM document d;
	PERFORM search_put_change(r) FROM revision r;
	PERFORM search_put_comment(c) FROM revision_comment c;
	PERFORM search_put_request(q) FROM request q;
	FOREACH name IN ARRAY forced LOOP
		EXECUTE format('ALTER TABLE %s FORCE ROW LEVEL SECURITY', name);
	END LOOP;
END $$;
