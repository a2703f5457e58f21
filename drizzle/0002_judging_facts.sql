ALTER TABLE `judgements` ADD `faults` json;--> statement-breakpoint
ALTER TABLE `judgements` ADD `in_hand` boolean DEFAULT false NOT NULL;--> statement-breakpoint
ALTER TABLE `marks` ADD `rest` boolean DEFAULT false NOT NULL;--> statement-breakpoint
ALTER TABLE `standings` ADD `alive_on` date;--> statement-breakpoint
ALTER TABLE `standings` ADD `keeps` int;