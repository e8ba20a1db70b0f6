-- What the schema generator cannot say of notices: which practices have mail to be sent, and that a sign-in has ended, told to
-- whoever holds a stream for it (services/events.ts reads the channel).

GRANT SELECT ON mail TO putlog_lookup;--> statement-breakpoint
CREATE POLICY mail_lookup ON mail FOR SELECT TO putlog_lookup USING (true);--> statement-breakpoint
CREATE FUNCTION practices_with_due_mail() RETURNS SETOF uuid
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
	SELECT DISTINCT practice_id FROM mail WHERE state IN ('waiting', 'sending') AND due_at <= now()
$$;--> statement-breakpoint
REVOKE ALL ON FUNCTION practices_with_due_mail() FROM PUBLIC;--> statement-breakpoint
GRANT EXECUTE ON FUNCTION practices_with_due_mail() TO putlog_web;--> statement-breakpoint
GRANT CREATE ON SCHEMA public TO putlog_lookup;--> statement-breakpoint
ALTER FUNCTION practices_with_due_mail() OWNER TO putlog_lookup;--> statement-breakpoint
REVOKE CREATE ON SCHEMA public FROM putlog_lookup;--> statement-breakpoint

CREATE FUNCTION tell_sign_in_ended() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
	PERFORM pg_notify('putlog_events', json_build_object(
		'practice', OLD.practice_id, 'people', json_build_array(OLD.person_id),
		'event', json_build_object('type', 'sign_in_ended', 'id', to_jsonb(OLD) ->> 'id'))::text);
	RETURN NULL;
END $$;--> statement-breakpoint
CREATE TRIGGER session_ended AFTER DELETE ON session FOR EACH ROW EXECUTE FUNCTION tell_sign_in_ended();--> statement-breakpoint
CREATE TRIGGER api_token_ended AFTER UPDATE OF revoked_at ON api_token FOR EACH ROW
	WHEN (NEW.revoked_at IS NOT NULL) EXECUTE FUNCTION tell_sign_in_ended();--> statement-breakpoint
CREATE TRIGGER api_token_deleted AFTER DELETE ON api_token FOR EACH ROW EXECUTE FUNCTION tell_sign_in_ended();--> statement-breakpoint
-- Without an id: every sign-in of the person in the practice.
CREATE TRIGGER membership_ended AFTER UPDATE OF active ON membership FOR EACH ROW
	WHEN (NOT NEW.active) EXECUTE FUNCTION tell_sign_in_ended();--> statement-breakpoint
CREATE TRIGGER membership_deleted AFTER DELETE ON membership FOR EACH ROW EXECUTE FUNCTION tell_sign_in_ended();
