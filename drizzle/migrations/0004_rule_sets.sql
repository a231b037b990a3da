CREATE TABLE "rule_set_revisions" (
	"organisation_id" uuid NOT NULL,
	"rule_set_id" uuid NOT NULL,
	"revision" integer NOT NULL,
	"body" jsonb NOT NULL,
	"content_hash" text NOT NULL,
	"author_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "rule_set_revisions_organisation_id_rule_set_id_revision_pk" PRIMARY KEY("organisation_id","rule_set_id","revision")
);
--> statement-breakpoint
CREATE TABLE "rule_sets" (
	"organisation_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"place" text NOT NULL,
	"edition" text NOT NULL,
	"articles" jsonb NOT NULL,
	"revision" integer NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_by" uuid NOT NULL,
	CONSTRAINT "rule_sets_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "rule_set_revisions" ADD CONSTRAINT "rule_set_revisions_organisation_id_organization_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organization"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rule_set_revisions" ADD CONSTRAINT "rule_set_revisions_author_id_user_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rule_set_revisions" ADD CONSTRAINT "rule_set_revisions_organisation_id_rule_set_id_rule_sets_organisation_id_id_fk" FOREIGN KEY ("organisation_id","rule_set_id") REFERENCES "public"."rule_sets"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rule_sets" ADD CONSTRAINT "rule_sets_organisation_id_organization_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organization"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rule_sets" ADD CONSTRAINT "rule_sets_updated_by_user_id_fk" FOREIGN KEY ("updated_by") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rule_sets" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "rule_sets" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY own_organisation ON "rule_sets" USING (organisation_id = nullif(current_setting('app.org', true), '')::uuid)
  WITH CHECK (organisation_id = nullif(current_setting('app.org', true), '')::uuid);
--> statement-breakpoint
ALTER TABLE "rule_set_revisions" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "rule_set_revisions" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY own_organisation ON "rule_set_revisions" USING (organisation_id = nullif(current_setting('app.org', true), '')::uuid)
  WITH CHECK (organisation_id = nullif(current_setting('app.org', true), '')::uuid);
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON "rule_sets" TO inglefield_app;
--> statement-breakpoint
GRANT SELECT, INSERT ON "rule_set_revisions" TO inglefield_app;
--> statement-breakpoint
CREATE TRIGGER kept_for_good BEFORE UPDATE OR DELETE ON "rule_set_revisions" FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER never_emptied BEFORE TRUNCATE ON "rule_set_revisions" FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
