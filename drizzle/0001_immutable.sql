CREATE TRIGGER `suite_revisions_no_update` BEFORE UPDATE ON `suite_revisions` BEGIN SELECT RAISE(ABORT, 'A suite revision is never changed'); END;
--> statement-breakpoint
CREATE TRIGGER `suite_revisions_no_delete` BEFORE DELETE ON `suite_revisions` BEGIN SELECT RAISE(ABORT, 'A suite revision is never changed'); END;
--> statement-breakpoint
CREATE TRIGGER `cases_no_update` BEFORE UPDATE ON `cases` BEGIN SELECT RAISE(ABORT, 'A case of a suite revision is never changed'); END;
--> statement-breakpoint
CREATE TRIGGER `cases_no_delete` BEFORE DELETE ON `cases` BEGIN SELECT RAISE(ABORT, 'A case of a suite revision is never changed'); END;
--> statement-breakpoint
CREATE TRIGGER `reference_revisions_no_update` BEFORE UPDATE ON `reference_revisions` BEGIN SELECT RAISE(ABORT, 'A reference revision is never changed'); END;
--> statement-breakpoint
CREATE TRIGGER `reference_revisions_no_delete` BEFORE DELETE ON `reference_revisions` BEGIN SELECT RAISE(ABORT, 'A reference revision is never changed'); END;
--> statement-breakpoint
CREATE TRIGGER `reference_entries_no_update` BEFORE UPDATE ON `reference_entries` BEGIN SELECT RAISE(ABORT, 'A reference entry is never changed'); END;
--> statement-breakpoint
CREATE TRIGGER `reference_entries_no_delete` BEFORE DELETE ON `reference_entries` BEGIN SELECT RAISE(ABORT, 'A reference entry is never changed'); END;
--> statement-breakpoint
CREATE TRIGGER `allowance_revisions_no_update` BEFORE UPDATE ON `allowance_revisions` BEGIN SELECT RAISE(ABORT, 'An allowance revision is never changed'); END;
--> statement-breakpoint
CREATE TRIGGER `allowance_revisions_no_delete` BEFORE DELETE ON `allowance_revisions` BEGIN SELECT RAISE(ABORT, 'An allowance revision is never changed'); END;
--> statement-breakpoint
CREATE TRIGGER `audit_log_no_update` BEFORE UPDATE ON `audit_log` BEGIN SELECT RAISE(ABORT, 'An audit entry is never changed'); END;
--> statement-breakpoint
CREATE TRIGGER `audit_log_no_delete` BEFORE DELETE ON `audit_log` BEGIN SELECT RAISE(ABORT, 'An audit entry is never changed'); END;
