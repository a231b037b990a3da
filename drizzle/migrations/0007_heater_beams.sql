CREATE TABLE "heater_beam_revisions" (
	"organisation_id" uuid NOT NULL,
	"code" text NOT NULL,
	"revision" integer NOT NULL,
	"body" jsonb,
	"content_hash" text NOT NULL,
	"author_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "heater_beam_revisions_organisation_id_code_revision_pk" PRIMARY KEY("organisation_id","code","revision")
);
--> statement-breakpoint
CREATE TABLE "heater_beams" (
	"organisation_id" uuid NOT NULL,
	"code" text NOT NULL,
	"revision" integer NOT NULL,
	"body" jsonb,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_by" uuid NOT NULL,
	CONSTRAINT "heater_beams_organisation_id_code_pk" PRIMARY KEY("organisation_id","code")
);
--> statement-breakpoint
ALTER TABLE "heater_beam_revisions" ADD CONSTRAINT "heater_beam_revisions_organisation_id_organization_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organization"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "heater_beam_revisions" ADD CONSTRAINT "heater_beam_revisions_author_id_user_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "heater_beam_revisions" ADD CONSTRAINT "heater_beam_revisions_organisation_id_code_heater_beams_organisation_id_code_fk" FOREIGN KEY ("organisation_id","code") REFERENCES "public"."heater_beams"("organisation_id","code") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "heater_beams" ADD CONSTRAINT "heater_beams_organisation_id_organization_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organization"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "heater_beams" ADD CONSTRAINT "heater_beams_updated_by_user_id_fk" FOREIGN KEY ("updated_by") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "heater_beams" ADD CONSTRAINT "heater_beams_organisation_id_code_heater_models_organisation_id_code_fk" FOREIGN KEY ("organisation_id","code") REFERENCES "public"."heater_models"("organisation_id","code") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "heater_beams" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "heater_beams" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY own_organisation ON "heater_beams" USING (organisation_id = nullif(current_setting('app.org', true), '')::uuid)
  WITH CHECK (organisation_id = nullif(current_setting('app.org', true), '')::uuid);
--> statement-breakpoint
ALTER TABLE "heater_beam_revisions" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "heater_beam_revisions" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY own_organisation ON "heater_beam_revisions" USING (organisation_id = nullif(current_setting('app.org', true), '')::uuid)
  WITH CHECK (organisation_id = nullif(current_setting('app.org', true), '')::uuid);
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON "heater_beams" TO inglefield_app;
--> statement-breakpoint
GRANT SELECT, INSERT ON "heater_beam_revisions" TO inglefield_app;
--> statement-breakpoint
CREATE TRIGGER kept_for_good BEFORE UPDATE OR DELETE ON "heater_beam_revisions" FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER never_emptied BEFORE TRUNCATE ON "heater_beam_revisions" FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
