-- Rows of these tables are never changed or taken away, by any account.
CREATE TRIGGER tr_membership_roles_no_update BEFORE UPDATE ON `membership_roles` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'membership_roles only grows';
--> statement-breakpoint
CREATE TRIGGER tr_membership_roles_no_delete BEFORE DELETE ON `membership_roles` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'membership_roles only grows';
--> statement-breakpoint
CREATE TRIGGER tr_settings_no_update BEFORE UPDATE ON `settings` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'settings only grows';
--> statement-breakpoint
CREATE TRIGGER tr_settings_no_delete BEFORE DELETE ON `settings` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'settings only grows';
--> statement-breakpoint
CREATE TRIGGER tr_revisions_no_update BEFORE UPDATE ON `revisions` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'revisions only grows';
--> statement-breakpoint
CREATE TRIGGER tr_revisions_no_delete BEFORE DELETE ON `revisions` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'revisions only grows';
--> statement-breakpoint
CREATE TRIGGER tr_revision_acts_no_update BEFORE UPDATE ON `revision_acts` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'revision_acts only grows';
--> statement-breakpoint
CREATE TRIGGER tr_revision_acts_no_delete BEFORE DELETE ON `revision_acts` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'revision_acts only grows';
--> statement-breakpoint
CREATE TRIGGER tr_revision_pictures_no_update BEFORE UPDATE ON `revision_pictures` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'revision_pictures only grows';
--> statement-breakpoint
CREATE TRIGGER tr_revision_pictures_no_delete BEFORE DELETE ON `revision_pictures` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'revision_pictures only grows';
--> statement-breakpoint
CREATE TRIGGER tr_revision_reads_no_update BEFORE UPDATE ON `revision_reads` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'revision_reads only grows';
--> statement-breakpoint
CREATE TRIGGER tr_revision_reads_no_delete BEFORE DELETE ON `revision_reads` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'revision_reads only grows';
--> statement-breakpoint
CREATE TRIGGER tr_piece_events_no_update BEFORE UPDATE ON `piece_events` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'piece_events only grows';
--> statement-breakpoint
CREATE TRIGGER tr_piece_events_no_delete BEFORE DELETE ON `piece_events` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'piece_events only grows';
--> statement-breakpoint
CREATE TRIGGER tr_set_aside_events_no_update BEFORE UPDATE ON `set_aside_events` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'set_aside_events only grows';
--> statement-breakpoint
CREATE TRIGGER tr_set_aside_events_no_delete BEFORE DELETE ON `set_aside_events` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'set_aside_events only grows';
--> statement-breakpoint
CREATE TRIGGER tr_judgements_no_update BEFORE UPDATE ON `judgements` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'judgements only grows';
--> statement-breakpoint
CREATE TRIGGER tr_judgements_no_delete BEFORE DELETE ON `judgements` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'judgements only grows';
--> statement-breakpoint
CREATE TRIGGER tr_marks_no_update BEFORE UPDATE ON `marks` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'marks only grows';
--> statement-breakpoint
CREATE TRIGGER tr_marks_no_delete BEFORE DELETE ON `marks` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'marks only grows';
--> statement-breakpoint
CREATE TRIGGER tr_sign_offs_no_update BEFORE UPDATE ON `sign_offs` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'sign_offs only grows';
--> statement-breakpoint
CREATE TRIGGER tr_sign_offs_no_delete BEFORE DELETE ON `sign_offs` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'sign_offs only grows';
--> statement-breakpoint
CREATE TRIGGER tr_sign_off_pieces_no_update BEFORE UPDATE ON `sign_off_pieces` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'sign_off_pieces only grows';
--> statement-breakpoint
CREATE TRIGGER tr_sign_off_pieces_no_delete BEFORE DELETE ON `sign_off_pieces` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'sign_off_pieces only grows';
--> statement-breakpoint
CREATE TRIGGER tr_permission_acts_no_update BEFORE UPDATE ON `permission_acts` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'permission_acts only grows';
--> statement-breakpoint
CREATE TRIGGER tr_permission_acts_no_delete BEFORE DELETE ON `permission_acts` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'permission_acts only grows';
--> statement-breakpoint
CREATE TRIGGER tr_register_no_update BEFORE UPDATE ON `register` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'register only grows';
--> statement-breakpoint
CREATE TRIGGER tr_register_no_delete BEFORE DELETE ON `register` FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'register only grows';
