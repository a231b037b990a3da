-- Three database roles exist before the first migration (drizzle/database-roles.ts): inglefield_owner runs migrations,
-- inglefield_auth reaches accounts and membership, inglefield_app reaches an organisation's rows and nothing else.
REVOKE ALL ON SCHEMA public FROM PUBLIC;
--> statement-breakpoint
GRANT USAGE ON SCHEMA public TO inglefield_auth, inglefield_app;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "user", "session", "account", "verification", "organization", "member", "invitation", "sign_in_attempts" TO inglefield_auth;
--> statement-breakpoint
DO $$
DECLARE
  name text;
BEGIN
  FOREACH name IN ARRAY ARRAY['jobs', 'sites', 'site_revisions', 'briefs', 'brief_revisions', 'variants',
    'variant_revisions', 'heater_models', 'saved_answers', 'audit_events', 'offer_links']
  LOOP
    EXECUTE format('ALTER TABLE %I ENABLE ROW LEVEL SECURITY', name);
    EXECUTE format('ALTER TABLE %I FORCE ROW LEVEL SECURITY', name);
    EXECUTE format(
      'CREATE POLICY own_organisation ON %I USING (organisation_id = nullif(current_setting(''app.org'', true), '''')::uuid)
        WITH CHECK (organisation_id = nullif(current_setting(''app.org'', true), '''')::uuid)', name);
  END LOOP;
END $$;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON "jobs", "sites", "briefs", "variants", "heater_models", "offer_links" TO inglefield_app;
--> statement-breakpoint
GRANT DELETE ON "heater_models" TO inglefield_app;
--> statement-breakpoint
GRANT SELECT, INSERT ON "site_revisions", "brief_revisions", "variant_revisions", "audit_events" TO inglefield_app;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "saved_answers" TO inglefield_app;
--> statement-breakpoint
-- A revision and an event are for good, whoever asks.
CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql SET search_path = pg_catalog AS $$
BEGIN
  RAISE EXCEPTION '% is kept for good', TG_TABLE_NAME USING ERRCODE = 'restrict_violation';
END $$;
--> statement-breakpoint
CREATE TRIGGER kept_for_good BEFORE UPDATE OR DELETE ON "site_revisions" FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER kept_for_good BEFORE UPDATE OR DELETE ON "brief_revisions" FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER kept_for_good BEFORE UPDATE OR DELETE ON "variant_revisions" FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER kept_for_good BEFORE UPDATE OR DELETE ON "audit_events" FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
-- Truncating goes round row triggers.
CREATE TRIGGER never_emptied BEFORE TRUNCATE ON "site_revisions" FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER never_emptied BEFORE TRUNCATE ON "brief_revisions" FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER never_emptied BEFORE TRUNCATE ON "variant_revisions" FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER never_emptied BEFORE TRUNCATE ON "audit_events" FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
-- The one way from a token to an organisation. The function runs as its owner, who may look at links and no more.
CREATE POLICY token_lookup ON "offer_links" FOR SELECT TO inglefield_owner USING (true);
--> statement-breakpoint
CREATE FUNCTION find_offer_link(hash text) RETURNS TABLE (organisation_id uuid, link_id uuid)
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = pg_catalog, pg_temp AS $$
  SELECT l.organisation_id, l.id FROM public.offer_links l
  WHERE l.token_hash = hash AND l.revoked_at IS NULL AND l.expires_at > now()
$$;
--> statement-breakpoint
REVOKE ALL ON FUNCTION find_offer_link(text) FROM PUBLIC;
--> statement-breakpoint
GRANT EXECUTE ON FUNCTION find_offer_link(text) TO inglefield_app;
--> statement-breakpoint
-- Old saved answers of every organisation are swept by the job worker, which knows no organisation.
CREATE POLICY sweep_look ON "saved_answers" FOR SELECT TO inglefield_owner USING (true);
--> statement-breakpoint
CREATE POLICY sweep_old ON "saved_answers" FOR DELETE TO inglefield_owner USING (created_at < now() - interval '7 days');
