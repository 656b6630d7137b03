"""What to measure next, and what each outcome would mean."""
