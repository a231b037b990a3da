-- A photo that was deleted a week ago cannot be brought back: the hourly sweep, as the owner role, finds and removes it.
CREATE POLICY sweep_look ON "photos" FOR SELECT TO inglefield_owner USING (deleted_at < now() - interval '7 days');
--> statement-breakpoint
CREATE POLICY sweep_old ON "photos" FOR DELETE TO inglefield_owner USING (deleted_at < now() - interval '7 days');
