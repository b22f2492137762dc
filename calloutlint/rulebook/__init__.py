"""Rules as data: the rule sheet, its condition language, and the engine that knows no rule by name."""
