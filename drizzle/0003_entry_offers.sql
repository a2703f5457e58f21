ALTER TABLE `sessions` ADD `card_studio` char(26) CHARACTER SET ascii COLLATE ascii_bin;--> statement-breakpoint
ALTER TABLE `tokens` ADD `offer` json;