"""Weighs 1H signals: gives each predicted group a signal, says how well place, size and pattern suit."""
