"""What a structure would show on each instrument."""
