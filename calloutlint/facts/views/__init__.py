"""What rules ask: one view for each thing on a drawing, its members the facts."""
