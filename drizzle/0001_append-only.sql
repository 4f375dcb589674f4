-- Records are written once. What changes their standing later is another record that points back at them.
CREATE TRIGGER `events_no_update` BEFORE UPDATE ON `events` BEGIN
  SELECT RAISE(ABORT, 'events: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `events_no_delete` BEFORE DELETE ON `events` BEGIN
  SELECT RAISE(ABORT, 'events: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `proofs_no_update` BEFORE UPDATE ON `proofs` BEGIN
  SELECT RAISE(ABORT, 'proofs: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `proofs_no_delete` BEFORE DELETE ON `proofs` BEGIN
  SELECT RAISE(ABORT, 'proofs: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `confirmations_no_update` BEFORE UPDATE ON `confirmations` BEGIN
  SELECT RAISE(ABORT, 'confirmations: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `confirmations_no_delete` BEFORE DELETE ON `confirmations` BEGIN
  SELECT RAISE(ABORT, 'confirmations: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `acceptances_no_update` BEFORE UPDATE ON `acceptances` BEGIN
  SELECT RAISE(ABORT, 'acceptances: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `acceptances_no_delete` BEFORE DELETE ON `acceptances` BEGIN
  SELECT RAISE(ABORT, 'acceptances: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `keeps_no_update` BEFORE UPDATE ON `keeps` BEGIN
  SELECT RAISE(ABORT, 'keeps: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `keeps_no_delete` BEFORE DELETE ON `keeps` BEGIN
  SELECT RAISE(ABORT, 'keeps: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `proof_withdrawals_no_update` BEFORE UPDATE ON `proof_withdrawals` BEGIN
  SELECT RAISE(ABORT, 'proof_withdrawals: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `proof_withdrawals_no_delete` BEFORE DELETE ON `proof_withdrawals` BEGIN
  SELECT RAISE(ABORT, 'proof_withdrawals: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `signatures_no_update` BEFORE UPDATE ON `signatures` BEGIN
  SELECT RAISE(ABORT, 'signatures: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `signatures_no_delete` BEFORE DELETE ON `signatures` BEGIN
  SELECT RAISE(ABORT, 'signatures: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `signature_withdrawals_no_update` BEFORE UPDATE ON `signature_withdrawals` BEGIN
  SELECT RAISE(ABORT, 'signature_withdrawals: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `signature_withdrawals_no_delete` BEFORE DELETE ON `signature_withdrawals` BEGIN
  SELECT RAISE(ABORT, 'signature_withdrawals: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `release_signatures_no_update` BEFORE UPDATE ON `release_signatures` BEGIN
  SELECT RAISE(ABORT, 'release_signatures: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `release_signatures_no_delete` BEFORE DELETE ON `release_signatures` BEGIN
  SELECT RAISE(ABORT, 'release_signatures: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `release_signature_withdrawals_no_update` BEFORE UPDATE ON `release_signature_withdrawals` BEGIN
  SELECT RAISE(ABORT, 'release_signature_withdrawals: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `release_signature_withdrawals_no_delete` BEFORE DELETE ON `release_signature_withdrawals` BEGIN
  SELECT RAISE(ABORT, 'release_signature_withdrawals: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `openings_no_update` BEFORE UPDATE ON `openings` BEGIN
  SELECT RAISE(ABORT, 'openings: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `openings_no_delete` BEFORE DELETE ON `openings` BEGIN
  SELECT RAISE(ABORT, 'openings: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `opening_closings_no_update` BEFORE UPDATE ON `opening_closings` BEGIN
  SELECT RAISE(ABORT, 'opening_closings: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `opening_closings_no_delete` BEFORE DELETE ON `opening_closings` BEGIN
  SELECT RAISE(ABORT, 'opening_closings: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `opening_mistakes_no_update` BEFORE UPDATE ON `opening_mistakes` BEGIN
  SELECT RAISE(ABORT, 'opening_mistakes: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `opening_mistakes_no_delete` BEFORE DELETE ON `opening_mistakes` BEGIN
  SELECT RAISE(ABORT, 'opening_mistakes: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `loose_ends_no_update` BEFORE UPDATE ON `loose_ends` BEGIN
  SELECT RAISE(ABORT, 'loose_ends: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `loose_ends_no_delete` BEFORE DELETE ON `loose_ends` BEGIN
  SELECT RAISE(ABORT, 'loose_ends: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `loose_end_events_no_update` BEFORE UPDATE ON `loose_end_events` BEGIN
  SELECT RAISE(ABORT, 'loose_end_events: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `loose_end_events_no_delete` BEFORE DELETE ON `loose_end_events` BEGIN
  SELECT RAISE(ABORT, 'loose_end_events: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `findings_no_update` BEFORE UPDATE ON `findings` BEGIN
  SELECT RAISE(ABORT, 'findings: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `findings_no_delete` BEFORE DELETE ON `findings` BEGIN
  SELECT RAISE(ABORT, 'findings: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `finding_events_no_update` BEFORE UPDATE ON `finding_events` BEGIN
  SELECT RAISE(ABORT, 'finding_events: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `finding_events_no_delete` BEFORE DELETE ON `finding_events` BEGIN
  SELECT RAISE(ABORT, 'finding_events: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `tool_checks_no_update` BEFORE UPDATE ON `tool_checks` BEGIN
  SELECT RAISE(ABORT, 'tool_checks: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `tool_checks_no_delete` BEFORE DELETE ON `tool_checks` BEGIN
  SELECT RAISE(ABORT, 'tool_checks: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `extinguisher_checks_no_update` BEFORE UPDATE ON `extinguisher_checks` BEGIN
  SELECT RAISE(ABORT, 'extinguisher_checks: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `extinguisher_checks_no_delete` BEFORE DELETE ON `extinguisher_checks` BEGIN
  SELECT RAISE(ABORT, 'extinguisher_checks: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `rung_events_no_update` BEFORE UPDATE ON `rung_events` BEGIN
  SELECT RAISE(ABORT, 'rung_events: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `rung_events_no_delete` BEFORE DELETE ON `rung_events` BEGIN
  SELECT RAISE(ABORT, 'rung_events: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `plan_versions_no_update` BEFORE UPDATE ON `plan_versions` BEGIN
  SELECT RAISE(ABORT, 'plan_versions: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `plan_versions_no_delete` BEFORE DELETE ON `plan_versions` BEGIN
  SELECT RAISE(ABORT, 'plan_versions: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `acks_no_update` BEFORE UPDATE ON `acks` BEGIN
  SELECT RAISE(ABORT, 'acks: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `acks_no_delete` BEFORE DELETE ON `acks` BEGIN
  SELECT RAISE(ABORT, 'acks: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `answers_no_update` BEFORE UPDATE ON `answers` BEGIN
  SELECT RAISE(ABORT, 'answers: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `answers_no_delete` BEFORE DELETE ON `answers` BEGIN
  SELECT RAISE(ABORT, 'answers: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `winds_no_update` BEFORE UPDATE ON `winds` BEGIN
  SELECT RAISE(ABORT, 'winds: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `winds_no_delete` BEFORE DELETE ON `winds` BEGIN
  SELECT RAISE(ABORT, 'winds: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `run_acts_no_update` BEFORE UPDATE ON `run_acts` BEGIN
  SELECT RAISE(ABORT, 'run_acts: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `run_acts_no_delete` BEFORE DELETE ON `run_acts` BEGIN
  SELECT RAISE(ABORT, 'run_acts: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `exceedances_no_update` BEFORE UPDATE ON `exceedances` BEGIN
  SELECT RAISE(ABORT, 'exceedances: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `exceedances_no_delete` BEFORE DELETE ON `exceedances` BEGIN
  SELECT RAISE(ABORT, 'exceedances: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `exceedance_answers_no_update` BEFORE UPDATE ON `exceedance_answers` BEGIN
  SELECT RAISE(ABORT, 'exceedance_answers: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `exceedance_answers_no_delete` BEFORE DELETE ON `exceedance_answers` BEGIN
  SELECT RAISE(ABORT, 'exceedance_answers: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `files_no_update` BEFORE UPDATE ON `files` BEGIN
  SELECT RAISE(ABORT, 'files: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `files_no_delete` BEFORE DELETE ON `files` BEGIN
  SELECT RAISE(ABORT, 'files: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `commands_no_update` BEFORE UPDATE ON `commands` BEGIN
  SELECT RAISE(ABORT, 'commands: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `installs_no_delete` BEFORE DELETE ON `installs` BEGIN
  SELECT RAISE(ABORT, 'installs: rows are hidden or ended, never deleted');
END;
--> statement-breakpoint
CREATE TRIGGER `members_no_delete` BEFORE DELETE ON `members` BEGIN
  SELECT RAISE(ABORT, 'members: rows are hidden or ended, never deleted');
END;
--> statement-breakpoint
CREATE TRIGGER `values_no_delete` BEFORE DELETE ON `values` BEGIN
  SELECT RAISE(ABORT, 'values: rows are hidden or ended, never deleted');
END;
--> statement-breakpoint
CREATE TRIGGER `gates_no_delete` BEFORE DELETE ON `gates` BEGIN
  SELECT RAISE(ABORT, 'gates: rows are hidden or ended, never deleted');
END;
--> statement-breakpoint
CREATE TRIGGER `items_no_delete` BEFORE DELETE ON `items` BEGIN
  SELECT RAISE(ABORT, 'items: rows are hidden or ended, never deleted');
END;
--> statement-breakpoint
CREATE TRIGGER `rungs_no_delete` BEFORE DELETE ON `rungs` BEGIN
  SELECT RAISE(ABORT, 'rungs: rows are hidden or ended, never deleted');
END;
--> statement-breakpoint
CREATE TRIGGER `runs_no_delete` BEFORE DELETE ON `runs` BEGIN
  SELECT RAISE(ABORT, 'runs: rows are hidden or ended, never deleted');
END;
--> statement-breakpoint
CREATE TRIGGER `tools_no_delete` BEFORE DELETE ON `tools` BEGIN
  SELECT RAISE(ABORT, 'tools: rows are hidden or ended, never deleted');
END;
--> statement-breakpoint
CREATE TRIGGER `extinguishers_no_delete` BEFORE DELETE ON `extinguishers` BEGIN
  SELECT RAISE(ABORT, 'extinguishers: rows are hidden or ended, never deleted');
END;
--> statement-breakpoint
CREATE TRIGGER `users_no_delete` BEFORE DELETE ON `users` BEGIN
  SELECT RAISE(ABORT, 'users: rows are hidden or ended, never deleted');
END;
--> statement-breakpoint
CREATE TRIGGER `member_roles_no_delete` BEFORE DELETE ON `member_roles` BEGIN
  SELECT RAISE(ABORT, 'member_roles: periods are closed, never deleted');
END;
--> statement-breakpoint
CREATE TRIGGER `member_roles_close_once` BEFORE UPDATE ON `member_roles`
WHEN OLD.`to` IS NOT NULL OR NEW.`to` IS NULL OR NEW.`id` IS NOT OLD.`id` OR NEW.`install_id` IS NOT OLD.`install_id` OR NEW.`user_id` IS NOT OLD.`user_id`
  OR NEW.`role` IS NOT OLD.`role` OR NEW.`from` IS NOT OLD.`from` OR NEW.`granted_by` IS NOT OLD.`granted_by`
BEGIN
  SELECT RAISE(ABORT, 'member_roles: a period is closed once and not changed');
END;
--> statement-breakpoint
CREATE TRIGGER `events_in_order` BEFORE INSERT ON `events`
WHEN NEW.`seq` IS NOT (SELECT coalesce(max(`seq`), 0) + 1 FROM `events` WHERE `install_id` = NEW.`install_id`)
  OR NEW.`prev` IS NOT coalesce((SELECT `hash` FROM `events` WHERE `install_id` = NEW.`install_id` ORDER BY `seq` DESC LIMIT 1), '0000000000000000000000000000000000000000000000000000000000000000')
BEGIN
  SELECT RAISE(ABORT, 'events: the chain goes on from its newest line');
END;
--> statement-breakpoint
-- REPLACE takes a row away without asking the triggers of DELETE.
CREATE TRIGGER `proofs_no_replace` BEFORE INSERT ON `proofs`
WHEN EXISTS (SELECT 1 FROM `proofs` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'proofs: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `confirmations_no_replace` BEFORE INSERT ON `confirmations`
WHEN EXISTS (SELECT 1 FROM `confirmations` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'confirmations: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `acceptances_no_replace` BEFORE INSERT ON `acceptances`
WHEN EXISTS (SELECT 1 FROM `acceptances` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'acceptances: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `keeps_no_replace` BEFORE INSERT ON `keeps`
WHEN EXISTS (SELECT 1 FROM `keeps` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'keeps: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `proof_withdrawals_no_replace` BEFORE INSERT ON `proof_withdrawals`
WHEN EXISTS (SELECT 1 FROM `proof_withdrawals` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`) OR (`proof_id` = NEW.`proof_id`))
BEGIN
  SELECT RAISE(ABORT, 'proof_withdrawals: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `signatures_no_replace` BEFORE INSERT ON `signatures`
WHEN EXISTS (SELECT 1 FROM `signatures` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'signatures: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `signature_withdrawals_no_replace` BEFORE INSERT ON `signature_withdrawals`
WHEN EXISTS (SELECT 1 FROM `signature_withdrawals` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`) OR (`signature_id` = NEW.`signature_id`))
BEGIN
  SELECT RAISE(ABORT, 'signature_withdrawals: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `release_signatures_no_replace` BEFORE INSERT ON `release_signatures`
WHEN EXISTS (SELECT 1 FROM `release_signatures` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'release_signatures: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `release_signature_withdrawals_no_replace` BEFORE INSERT ON `release_signature_withdrawals`
WHEN EXISTS (SELECT 1 FROM `release_signature_withdrawals` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`) OR (`signature_id` = NEW.`signature_id`))
BEGIN
  SELECT RAISE(ABORT, 'release_signature_withdrawals: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `openings_no_replace` BEFORE INSERT ON `openings`
WHEN EXISTS (SELECT 1 FROM `openings` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'openings: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `opening_closings_no_replace` BEFORE INSERT ON `opening_closings`
WHEN EXISTS (SELECT 1 FROM `opening_closings` WHERE (`id` = NEW.`id`) OR (`opening_id` = NEW.`opening_id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'opening_closings: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `opening_mistakes_no_replace` BEFORE INSERT ON `opening_mistakes`
WHEN EXISTS (SELECT 1 FROM `opening_mistakes` WHERE (`id` = NEW.`id`) OR (`opening_id` = NEW.`opening_id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'opening_mistakes: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `loose_ends_no_replace` BEFORE INSERT ON `loose_ends`
WHEN EXISTS (SELECT 1 FROM `loose_ends` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'loose_ends: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `loose_end_events_no_replace` BEFORE INSERT ON `loose_end_events`
WHEN EXISTS (SELECT 1 FROM `loose_end_events` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'loose_end_events: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `findings_no_replace` BEFORE INSERT ON `findings`
WHEN EXISTS (SELECT 1 FROM `findings` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'findings: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `finding_events_no_replace` BEFORE INSERT ON `finding_events`
WHEN EXISTS (SELECT 1 FROM `finding_events` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'finding_events: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `tool_checks_no_replace` BEFORE INSERT ON `tool_checks`
WHEN EXISTS (SELECT 1 FROM `tool_checks` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'tool_checks: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `extinguisher_checks_no_replace` BEFORE INSERT ON `extinguisher_checks`
WHEN EXISTS (SELECT 1 FROM `extinguisher_checks` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'extinguisher_checks: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `rung_events_no_replace` BEFORE INSERT ON `rung_events`
WHEN EXISTS (SELECT 1 FROM `rung_events` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'rung_events: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `plan_versions_no_replace` BEFORE INSERT ON `plan_versions`
WHEN EXISTS (SELECT 1 FROM `plan_versions` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`) OR (`run_id` = NEW.`run_id` AND `version` = NEW.`version`))
BEGIN
  SELECT RAISE(ABORT, 'plan_versions: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `acks_no_replace` BEFORE INSERT ON `acks`
WHEN EXISTS (SELECT 1 FROM `acks` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'acks: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `answers_no_replace` BEFORE INSERT ON `answers`
WHEN EXISTS (SELECT 1 FROM `answers` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'answers: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `winds_no_replace` BEFORE INSERT ON `winds`
WHEN EXISTS (SELECT 1 FROM `winds` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'winds: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `run_acts_no_replace` BEFORE INSERT ON `run_acts`
WHEN EXISTS (SELECT 1 FROM `run_acts` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'run_acts: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `exceedances_no_replace` BEFORE INSERT ON `exceedances`
WHEN EXISTS (SELECT 1 FROM `exceedances` WHERE (`id` = NEW.`id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'exceedances: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `exceedance_answers_no_replace` BEFORE INSERT ON `exceedance_answers`
WHEN EXISTS (SELECT 1 FROM `exceedance_answers` WHERE (`id` = NEW.`id`) OR (`exceedance_id` = NEW.`exceedance_id`) OR (`install_id` = NEW.`install_id` AND `seq` = NEW.`seq`))
BEGIN
  SELECT RAISE(ABORT, 'exceedance_answers: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `files_no_replace` BEFORE INSERT ON `files`
WHEN EXISTS (SELECT 1 FROM `files` WHERE (`id` = NEW.`id`))
BEGIN
  SELECT RAISE(ABORT, 'files: records are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `commands_no_replace` BEFORE INSERT ON `commands`
WHEN EXISTS (SELECT 1 FROM `commands` WHERE (`id` = NEW.`id`))
BEGIN
  SELECT RAISE(ABORT, 'commands: records are append-only');
END;
