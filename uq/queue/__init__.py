"""In: jobs with what they need; requests of users; what runners say. Out: who works on which job, and where each stands.
Must not know: what a study means, nor how one is solved.
"""
