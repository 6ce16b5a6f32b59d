package response

import "hoopsheet/core/diaphragm"

func (s *start) bodies(c *Case, begin []state, acts []acting) *diaphragm.Problem { return nil }
