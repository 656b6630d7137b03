"""The engine's methods: each takes plain JSON values and answers them, doing no chemistry of its own."""
