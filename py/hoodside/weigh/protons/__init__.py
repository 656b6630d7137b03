"""Weighs 1H signals: gives each predicted group of H a signal, then says how well place, size and pattern suit."""
