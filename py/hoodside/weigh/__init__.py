"""Weighs readings for and against structures, in decibans (Good, Probability and the Weighing of Evidence).

Every weight is 10 log10 of the likelihood of a reading under "this structure" over that under "some other
compound of the same class". Logs and sums are kept in decibans throughout.
"""
