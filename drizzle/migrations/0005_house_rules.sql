CREATE TABLE "house_rules" (
	"organisation_id" uuid PRIMARY KEY NOT NULL,
	"revision" integer NOT NULL,
	"body" jsonb NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_by" uuid NOT NULL
);
--> statement-breakpoint
ALTER TABLE "house_rules" ADD CONSTRAINT "house_rules_organisation_id_organization_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organization"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "house_rules" ADD CONSTRAINT "house_rules_updated_by_user_id_fk" FOREIGN KEY ("updated_by") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "house_rules" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "house_rules" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY own_organisation ON "house_rules" USING (organisation_id = nullif(current_setting('app.org', true), '')::uuid)
  WITH CHECK (organisation_id = nullif(current_setting('app.org', true), '')::uuid);
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON "house_rules" TO inglefield_app;
