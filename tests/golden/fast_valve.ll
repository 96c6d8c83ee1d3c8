define internal void @uq_system(ptr readonly %lanes, <8 x double> %time, ptr readonly %states, ptr %rates) #0 {
entry:
  %v1 = getelementptr inbounds <8 x double>, ptr %lanes, i64 18
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = getelementptr inbounds <8 x double>, ptr %states, i64 0
  %v4 = load <8 x double>, ptr %v3, align 64
  %v5 = getelementptr inbounds <8 x double>, ptr %states, i64 1
  %v6 = load <8 x double>, ptr %v5, align 64
  %v7 = getelementptr inbounds <8 x double>, ptr %lanes, i64 11
  %v8 = load <8 x double>, ptr %v7, align 64
  %v9 = fsub <8 x double> %time, %v8
  %v10 = getelementptr inbounds <8 x double>, ptr %lanes, i64 21
  %v11 = load <8 x double>, ptr %v10, align 64
  %v12 = getelementptr inbounds <8 x double>, ptr %lanes, i64 20
  %v13 = load <8 x double>, ptr %v12, align 64
  %v14 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v11, <8 x double> %v9, <8 x double> %v13)
  %v15 = fneg <8 x double> %v4
  %v16 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v15, <8 x double> %v4, <8 x double> %v6)
  %v17 = fsub <8 x double> %v14, %v4
  %v18 = fsub <8 x double> %v17, %v6
  %v19 = fmul <8 x double> %v2, %v18
  %v20 = getelementptr inbounds <8 x double>, ptr %rates, i64 0
  store <8 x double> %v16, ptr %v20, align 64
  %v21 = getelementptr inbounds <8 x double>, ptr %rates, i64 1
  store <8 x double> %v19, ptr %v21, align 64
  ret void
}

define i64 @uq_start(ptr noalias %lanes, ptr noalias readonly %settings) #0 {
entry:
  ; what depends on the inputs alone, once per member
  %v1 = getelementptr inbounds <8 x double>, ptr %lanes, i64 18
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = fmul <8 x double> %v2, splat (double 0x0000000000000000)
  %v4 = fmul <8 x double> %v2, splat (double 0xBFF0000000000000)
  %v5 = getelementptr inbounds <8 x double>, ptr %lanes, i64 19
  store <8 x double> %v4, ptr %v5, align 64
  %v6 = getelementptr inbounds <8 x double>, ptr %lanes, i64 22
  store <8 x double> %v3, ptr %v6, align 64
  %v7 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v3)
  %v8 = getelementptr inbounds <8 x double>, ptr %lanes, i64 26
  store <8 x double> %v7, ptr %v8, align 64
  %v9 = getelementptr inbounds <8 x double>, ptr %lanes, i64 23
  store <8 x double> %v3, ptr %v9, align 64
  %v10 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v3)
  %v11 = getelementptr inbounds <8 x double>, ptr %lanes, i64 27
  store <8 x double> %v10, ptr %v11, align 64
  ; first rates and first step
  %v12 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  %v13 = load <8 x double>, ptr %v12, align 64
  %v14 = getelementptr inbounds <8 x double>, ptr %lanes, i64 11
  %v15 = load <8 x double>, ptr %v14, align 64
  %v16 = fsub <8 x double> %v13, %v15
  %v17 = getelementptr inbounds <8 x double>, ptr %lanes, i64 21
  %v18 = load <8 x double>, ptr %v17, align 64
  %v19 = getelementptr inbounds <8 x double>, ptr %lanes, i64 20
  %v20 = load <8 x double>, ptr %v19, align 64
  %v21 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v18, <8 x double> %v16, <8 x double> %v20)
  %v22 = fneg <8 x double> %v3
  %v23 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v22, <8 x double> %v3, <8 x double> %v3)
  %v24 = fsub <8 x double> %v21, %v3
  %v25 = fsub <8 x double> %v24, %v3
  %v26 = fmul <8 x double> %v2, %v25
  %v27 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  store <8 x double> %v23, ptr %v27, align 64
  %v28 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  store <8 x double> %v26, ptr %v28, align 64
  %v29 = getelementptr inbounds <8 x double>, ptr %lanes, i64 2
  %v30 = load <8 x double>, ptr %v29, align 64
  %v31 = fsub <8 x double> %v30, %v13
  %v32 = getelementptr inbounds <8 x double>, ptr %settings, i64 0
  %v33 = load <8 x double>, ptr %v32, align 64
  %v34 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v3)
  %v35 = getelementptr inbounds <8 x double>, ptr %settings, i64 9
  %v36 = load <8 x double>, ptr %v35, align 64
  %v37 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v33, <8 x double> %v34, <8 x double> %v36)
  %v38 = fdiv <8 x double> %v3, %v37
  %v39 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v38, <8 x double> %v38, <8 x double> splat (double 0x0000000000000000))
  %v40 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v3)
  %v41 = getelementptr inbounds <8 x double>, ptr %settings, i64 10
  %v42 = load <8 x double>, ptr %v41, align 64
  %v43 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v33, <8 x double> %v40, <8 x double> %v42)
  %v44 = fdiv <8 x double> %v3, %v43
  %v45 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v44, <8 x double> %v44, <8 x double> %v39)
  %v46 = fmul <8 x double> %v45, splat (double 0x3FE0000000000000)
  %v47 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v46)
  %v48 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v3)
  %v49 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v33, <8 x double> %v48, <8 x double> %v36)
  %v50 = fdiv <8 x double> %v23, %v49
  %v51 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v50, <8 x double> %v50, <8 x double> splat (double 0x0000000000000000))
  %v52 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v3)
  %v53 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v33, <8 x double> %v52, <8 x double> %v42)
  %v54 = fdiv <8 x double> %v26, %v53
  %v55 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v54, <8 x double> %v54, <8 x double> %v51)
  %v56 = fmul <8 x double> %v55, splat (double 0x3FE0000000000000)
  %v57 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v56)
  %v58 = fcmp olt <8 x double> %v47, splat (double 0x3EE4F8B588E368F1)
  %v59 = fmul <8 x double> %v57, %v31
  %v60 = fcmp olt <8 x double> %v59, splat (double 0x3EE4F8B588E368F1)
  %v61 = or <8 x i1> %v58, %v60
  %v62 = fmul <8 x double> %v31, splat (double 0x3EB0C6F7A0B5ED8D)
  %v63 = fmul <8 x double> splat (double 0x3F847AE147AE147B), %v47
  %v64 = fdiv <8 x double> %v63, %v57
  %v65 = select <8 x i1> %v61, <8 x double> %v62, <8 x double> %v64
  %v66 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v13)
  %v67 = getelementptr inbounds <8 x double>, ptr %settings, i64 2
  %v68 = load <8 x double>, ptr %v67, align 64
  %v69 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3CF0000000000000), <8 x double> %v66, <8 x double> %v68)
  %v70 = fcmp ogt <8 x double> %v65, %v69
  %v71 = select <8 x i1> %v70, <8 x double> %v65, <8 x double> %v69
  %v72 = fcmp olt <8 x double> %v71, %v31
  %v73 = select <8 x i1> %v72, <8 x double> %v71, <8 x double> %v31
  %v74 = fdiv <8 x double> %v47, %v57
  %v75 = fcmp olt <8 x double> %v74, %v31
  %v76 = select <8 x i1> %v75, <8 x double> %v74, <8 x double> %v31
  %v77 = select <8 x i1> %v61, <8 x double> %v31, <8 x double> %v76
  %v78 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v73, <8 x double> %v23, <8 x double> %v3)
  %v79 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v73, <8 x double> %v26, <8 x double> %v3)
  %v80 = fadd <8 x double> %v13, %v73
  %v81 = fsub <8 x double> %v80, %v15
  %v82 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v18, <8 x double> %v81, <8 x double> %v20)
  %v83 = fneg <8 x double> %v78
  %v84 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v83, <8 x double> %v78, <8 x double> %v79)
  %v85 = fsub <8 x double> %v82, %v78
  %v86 = fsub <8 x double> %v85, %v79
  %v87 = fmul <8 x double> %v2, %v86
  %v88 = fsub <8 x double> %v84, %v23
  %v89 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v3)
  %v90 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v33, <8 x double> %v89, <8 x double> %v36)
  %v91 = fdiv <8 x double> %v88, %v90
  %v92 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v91, <8 x double> %v91, <8 x double> splat (double 0x0000000000000000))
  %v93 = fsub <8 x double> %v87, %v26
  %v94 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v3)
  %v95 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v33, <8 x double> %v94, <8 x double> %v42)
  %v96 = fdiv <8 x double> %v93, %v95
  %v97 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v96, <8 x double> %v96, <8 x double> %v92)
  %v98 = fmul <8 x double> %v97, splat (double 0x3FE0000000000000)
  %v99 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v98)
  %v100 = fdiv <8 x double> %v99, %v73
  %v101 = fmul <8 x double> %v57, %v77
  %v102 = fmul <8 x double> %v100, %v77
  %v103 = fmul <8 x double> %v102, %v77
  %v104 = fcmp ogt <8 x double> %v101, %v103
  %v105 = select <8 x i1> %v104, <8 x double> %v101, <8 x double> %v103
  %v106 = fcmp olt <8 x double> %v105, splat (double 0x73D658E3AB795204)
  %v107 = select <8 x i1> %v106, <8 x double> %v105, <8 x double> splat (double 0x73D658E3AB795204)
  %v108 = fcmp ogt <8 x double> %v107, splat (double 0x0C06E93F5DA2824C)
  %v109 = select <8 x i1> %v108, <8 x double> %v107, <8 x double> splat (double 0x0C06E93F5DA2824C)
  %v110 = bitcast <8 x double> %v109 to <8 x i64>
  %v111 = lshr <8 x i64> %v110, splat (i64 52)
  %v112 = or <8 x i64> %v111, splat (i64 4841369599423283200)
  %v113 = bitcast <8 x i64> %v112 to <8 x double>
  %v114 = fsub <8 x double> %v113, splat (double 0x43300000000003FF)
  %v115 = and <8 x i64> %v110, splat (i64 4503599627370495)
  %v116 = or <8 x i64> %v115, splat (i64 4607182418800017408)
  %v117 = bitcast <8 x i64> %v116 to <8 x double>
  %v118 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA604C059210386), <8 x double> %v117, <8 x double> splat (double 0xBFD9C2C7904CE9BE))
  %v119 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v118, <8 x double> %v117, <8 x double> splat (double 0x3FF96E7C9A8551E4))
  %v120 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v119, <8 x double> %v117, <8 x double> splat (double 0xC00BEB4578B01506))
  %v121 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v120, <8 x double> %v117, <8 x double> splat (double 0x401431010187BF7D))
  %v122 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v121, <8 x double> %v117, <8 x double> splat (double 0xC0064DAC40654ADD))
  %v123 = fadd <8 x double> %v114, %v122
  %v124 = fmul <8 x double> %v123, splat (double 0xBFC999999999999A)
  %v125 = fadd <8 x double> %v124, splat (double 0xBFF542A5A12E1C5A)
  %v126 = fadd <8 x double> %v125, splat (double 0x4338000000000000)
  %v127 = fsub <8 x double> %v126, splat (double 0x4338000000000000)
  %v128 = fsub <8 x double> %v125, %v127
  %v129 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F83CBFA3EF5DF15), <8 x double> %v128, <8 x double> splat (double 0x3FACA1CEF240FA9C))
  %v130 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v129, <8 x double> %v128, <8 x double> splat (double 0x3FCEBFA4C61D8623))
  %v131 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v130, <8 x double> %v128, <8 x double> splat (double 0x3FE62E0C17657753))
  %v132 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v131, <8 x double> %v128, <8 x double> splat (double 0x3FF0000000000000))
  %v133 = bitcast <8 x double> %v126 to <8 x i64>
  %v134 = shl <8 x i64> %v133, splat (i64 52)
  %v135 = bitcast <8 x double> %v132 to <8 x i64>
  %v136 = add <8 x i64> %v135, %v134
  %v137 = bitcast <8 x i64> %v136 to <8 x double>
  %v138 = fmul <8 x double> %v77, %v137
  %v139 = fmul <8 x double> %v31, splat (double 0x3EB0C6F7A0B5ED8D)
  %v140 = fmul <8 x double> %v73, splat (double 0x3F50624DD2F1A9FC)
  %v141 = fcmp ogt <8 x double> %v139, %v140
  %v142 = select <8 x i1> %v141, <8 x double> %v139, <8 x double> %v140
  %v143 = fcmp ole <8 x double> %v105, splat (double 0x3CD203AF9EE75616)
  %v144 = select <8 x i1> %v143, <8 x double> %v142, <8 x double> %v138
  %v145 = fmul <8 x double> splat (double 0x4059000000000000), %v73
  %v146 = fcmp olt <8 x double> %v145, %v144
  %v147 = select <8 x i1> %v146, <8 x double> %v145, <8 x double> %v144
  %v148 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v13)
  %v149 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3CF0000000000000), <8 x double> %v148, <8 x double> %v68)
  %v150 = fcmp ogt <8 x double> %v147, %v149
  %v151 = select <8 x i1> %v150, <8 x double> %v147, <8 x double> %v149
  %v152 = fcmp olt <8 x double> %v151, %v31
  %v153 = select <8 x i1> %v152, <8 x double> %v151, <8 x double> %v31
  %v154 = fcmp ord <8 x double> %v100, %v100
  %v155 = select <8 x i1> %v154, <8 x double> %v153, <8 x double> %v73
  %v156 = getelementptr inbounds <8 x double>, ptr %lanes, i64 1
  store <8 x double> %v155, ptr %v156, align 64
  %v157 = getelementptr inbounds <8 x double>, ptr %lanes, i64 6
  store <8 x double> splat (double 0xC03A934F0979A371), ptr %v157, align 64
  %v158 = getelementptr inbounds <8 x double>, ptr %lanes, i64 7
  store <8 x double> splat (double 0x0000000000000000), ptr %v158, align 64
  %v159 = getelementptr inbounds <8 x double>, ptr %lanes, i64 8
  store <8 x double> splat (double 0x0000000000000000), ptr %v159, align 64
  %v160 = getelementptr inbounds <8 x double>, ptr %lanes, i64 9
  store <8 x double> splat (double 0x0000000000000000), ptr %v160, align 64
  %v161 = getelementptr inbounds <8 x double>, ptr %lanes, i64 13
  store <8 x double> splat (double 0x0000000000000000), ptr %v161, align 64
  %v162 = getelementptr inbounds <8 x double>, ptr %lanes, i64 14
  store <8 x double> splat (double 0x0000000000000000), ptr %v162, align 64
  %v163 = getelementptr inbounds <8 x double>, ptr %lanes, i64 28
  store <8 x double> splat (double 0x0000000000000000), ptr %v163, align 64
  %v164 = getelementptr inbounds <8 x double>, ptr %lanes, i64 29
  store <8 x double> splat (double 0x4000000000000000), ptr %v164, align 64
  %v165 = getelementptr inbounds <8 x double>, ptr %lanes, i64 30
  store <8 x double> splat (double 0xC024000000000000), ptr %v165, align 64
  %v166 = getelementptr inbounds <8 x double>, ptr %lanes, i64 31
  store <8 x double> splat (double 0x4010000000000000), ptr %v166, align 64
  %v167 = getelementptr inbounds <8 x double>, ptr %lanes, i64 32
  store <8 x double> splat (double 0x0000000000000000), ptr %v167, align 64
  %v168 = getelementptr inbounds <8 x double>, ptr %lanes, i64 33
  store <8 x double> splat (double 0x0000000000000000), ptr %v168, align 64
  %v169 = getelementptr inbounds <8 x double>, ptr %lanes, i64 34
  store <8 x double> splat (double 0x0000000000000000), ptr %v169, align 64
  br label %loop170
loop170:
  %loop170.i = phi i64 [ 0, %entry ], [ %loop170.next, %loop170 ]
  %loop170.carried = phi i1 [ false, %entry ], [ %loop170.carried, %loop170 ]
  %v171 = add i64 %loop170.i, 17
  %v172 = getelementptr inbounds <8 x double>, ptr %settings, i64 %v171
  %v173 = load <8 x double>, ptr %v172, align 64
  %v174 = add i64 %loop170.i, 35
  %v175 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v174
  store <8 x double> %v173, ptr %v175, align 64
  %loop170.next = add nuw nsw i64 %loop170.i, 1
  %v176 = icmp ult i64 %loop170.next, 2
  br i1 %v176, label %loop170, label %loop170.end
loop170.end:
  %v177 = getelementptr inbounds <8 x double>, ptr %lanes, i64 10
  store <8 x double> splat (double 0x3FF0000000000000), ptr %v177, align 64
  %v178 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  store <8 x double> %v13, ptr %v178, align 64
  %v179 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  store <8 x double> splat (double 0x3FF0000000000000), ptr %v179, align 64
  %v180 = getelementptr inbounds <8 x double>, ptr %settings, i64 11
  %v181 = load <8 x double>, ptr %v180, align 64
  %v182 = fcmp olt <8 x double> %v3, %v181
  %v183 = or <8 x i1> zeroinitializer, %v182
  %v184 = getelementptr inbounds <8 x double>, ptr %settings, i64 13
  %v185 = load <8 x double>, ptr %v184, align 64
  %v186 = fcmp ogt <8 x double> %v3, %v185
  %v187 = or <8 x i1> %v183, %v186
  %v188 = getelementptr inbounds <8 x double>, ptr %settings, i64 12
  %v189 = load <8 x double>, ptr %v188, align 64
  %v190 = fcmp olt <8 x double> %v3, %v189
  %v191 = or <8 x i1> %v187, %v190
  %v192 = getelementptr inbounds <8 x double>, ptr %settings, i64 14
  %v193 = load <8 x double>, ptr %v192, align 64
  %v194 = fcmp ogt <8 x double> %v3, %v193
  %v195 = or <8 x i1> %v191, %v194
  %v196 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v3, <8 x double> splat (double 0x0000000000000000), <8 x double> splat (double 0x0000000000000000))
  %v197 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v23, <8 x double> splat (double 0x0000000000000000), <8 x double> %v196)
  %v198 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v3, <8 x double> splat (double 0x0000000000000000), <8 x double> %v197)
  %v199 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v26, <8 x double> splat (double 0x0000000000000000), <8 x double> %v198)
  %v200 = fcmp uno <8 x double> %v199, %v199
  %v201 = select <8 x i1> %v195, <8 x double> splat (double 0x4000000000000000), <8 x double> splat (double 0x0000000000000000)
  %v202 = select <8 x i1> %v200, <8 x double> splat (double 0x4008000000000000), <8 x double> %v201
  %v203 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  store <8 x double> %v202, ptr %v203, align 64
  %v204 = or <8 x i1> %v195, %v200
  %v205 = bitcast <8 x i1> %v204 to i8
  %v206 = zext i8 %v205 to i64
  ret i64 %v206
}

define i64 @uq_rates(ptr noalias %lanes, ptr noalias readonly %settings) #0 {
entry:
  %v1 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = getelementptr inbounds <8 x double>, ptr %lanes, i64 18
  %v4 = load <8 x double>, ptr %v3, align 64
  %v5 = getelementptr inbounds <8 x double>, ptr %lanes, i64 22
  %v6 = load <8 x double>, ptr %v5, align 64
  %v7 = getelementptr inbounds <8 x double>, ptr %lanes, i64 23
  %v8 = load <8 x double>, ptr %v7, align 64
  %v9 = getelementptr inbounds <8 x double>, ptr %lanes, i64 11
  %v10 = load <8 x double>, ptr %v9, align 64
  %v11 = fsub <8 x double> %v2, %v10
  %v12 = getelementptr inbounds <8 x double>, ptr %lanes, i64 21
  %v13 = load <8 x double>, ptr %v12, align 64
  %v14 = getelementptr inbounds <8 x double>, ptr %lanes, i64 20
  %v15 = load <8 x double>, ptr %v14, align 64
  %v16 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v13, <8 x double> %v11, <8 x double> %v15)
  %v17 = fneg <8 x double> %v6
  %v18 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v17, <8 x double> %v6, <8 x double> %v8)
  %v19 = fsub <8 x double> %v16, %v6
  %v20 = fsub <8 x double> %v19, %v8
  %v21 = fmul <8 x double> %v4, %v20
  %v22 = getelementptr inbounds <8 x double>, ptr %lanes, i64 13
  %v23 = load <8 x double>, ptr %v22, align 64
  %v24 = fcmp ogt <8 x double> %v23, splat (double 0x0000000000000000)
  %v25 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  %v26 = load <8 x double>, ptr %v25, align 64
  %v27 = select <8 x i1> %v24, <8 x double> %v18, <8 x double> %v26
  %v28 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  store <8 x double> %v27, ptr %v28, align 64
  %v29 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  %v30 = load <8 x double>, ptr %v29, align 64
  %v31 = select <8 x i1> %v24, <8 x double> %v21, <8 x double> %v30
  %v32 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  store <8 x double> %v31, ptr %v32, align 64
  %v33 = getelementptr inbounds <8 x double>, ptr %lanes, i64 13
  store <8 x double> splat (double 0x0000000000000000), ptr %v33, align 64
  %v34 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v18, <8 x double> splat (double 0x0000000000000000), <8 x double> splat (double 0x0000000000000000))
  %v35 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v21, <8 x double> splat (double 0x0000000000000000), <8 x double> %v34)
  %v36 = fcmp uno <8 x double> %v35, %v35
  %v37 = and <8 x i1> %v24, %v36
  %v38 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  %v39 = load <8 x double>, ptr %v38, align 64
  %v40 = select <8 x i1> %v37, <8 x double> splat (double 0x4008000000000000), <8 x double> %v39
  %v41 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  store <8 x double> %v40, ptr %v41, align 64
  %v42 = bitcast <8 x i1> %v37 to i8
  %v43 = zext i8 %v42 to i64
  ret i64 %v43
}

define i64 @uq_step(ptr noalias %lanes, ptr noalias readonly %settings) #1 {
entry:
  ; length of the attempt: proposed, stretched or halved towards the end of the segment
  %v1 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = getelementptr inbounds <8 x double>, ptr %lanes, i64 1
  %v4 = load <8 x double>, ptr %v3, align 64
  %v5 = getelementptr inbounds <8 x double>, ptr %lanes, i64 2
  %v6 = load <8 x double>, ptr %v5, align 64
  %v7 = fsub <8 x double> %v6, %v2
  %v8 = fmul <8 x double> %v4, splat (double 0x3FF028F5C28F5C29)
  %v9 = fcmp oge <8 x double> %v8, %v7
  %v10 = fadd <8 x double> %v4, %v4
  %v11 = fcmp oge <8 x double> %v10, %v7
  %v12 = fmul <8 x double> %v7, splat (double 0x3FE0000000000000)
  %v13 = select <8 x i1> %v11, <8 x double> %v12, <8 x double> %v4
  %v14 = fadd <8 x double> %v2, %v13
  %v15 = select <8 x i1> %v9, <8 x double> %v6, <8 x double> %v14
  %v16 = fsub <8 x double> %v15, %v2
  ; stages
  %v17 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  %v18 = load <8 x double>, ptr %v17, align 64
  %v19 = fmul <8 x double> splat (double 0x3FC999999999999A), %v18
  %v20 = getelementptr inbounds <8 x double>, ptr %lanes, i64 22
  %v21 = load <8 x double>, ptr %v20, align 64
  %v22 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v19, <8 x double> %v21)
  %v23 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  %v24 = load <8 x double>, ptr %v23, align 64
  %v25 = fmul <8 x double> splat (double 0x3FC999999999999A), %v24
  %v26 = getelementptr inbounds <8 x double>, ptr %lanes, i64 23
  %v27 = load <8 x double>, ptr %v26, align 64
  %v28 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v25, <8 x double> %v27)
  %v29 = getelementptr inbounds <8 x double>, ptr %lanes, i64 18
  %v30 = load <8 x double>, ptr %v29, align 64
  %v31 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC999999999999A), <8 x double> %v16, <8 x double> %v2)
  %v32 = getelementptr inbounds <8 x double>, ptr %lanes, i64 11
  %v33 = load <8 x double>, ptr %v32, align 64
  %v34 = fsub <8 x double> %v31, %v33
  %v35 = getelementptr inbounds <8 x double>, ptr %lanes, i64 21
  %v36 = load <8 x double>, ptr %v35, align 64
  %v37 = getelementptr inbounds <8 x double>, ptr %lanes, i64 20
  %v38 = load <8 x double>, ptr %v37, align 64
  %v39 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v36, <8 x double> %v34, <8 x double> %v38)
  %v40 = fneg <8 x double> %v22
  %v41 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v40, <8 x double> %v22, <8 x double> %v28)
  %v42 = fsub <8 x double> %v39, %v22
  %v43 = fsub <8 x double> %v42, %v28
  %v44 = fmul <8 x double> %v30, %v43
  %v45 = fmul <8 x double> splat (double 0x3FB3333333333333), %v18
  %v46 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FCCCCCCCCCCCCCD), <8 x double> %v41, <8 x double> %v45)
  %v47 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v46, <8 x double> %v21)
  %v48 = fmul <8 x double> splat (double 0x3FB3333333333333), %v24
  %v49 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FCCCCCCCCCCCCCD), <8 x double> %v44, <8 x double> %v48)
  %v50 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v49, <8 x double> %v27)
  %v51 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD3333333333333), <8 x double> %v16, <8 x double> %v2)
  %v52 = fsub <8 x double> %v51, %v33
  %v53 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v36, <8 x double> %v52, <8 x double> %v38)
  %v54 = fneg <8 x double> %v47
  %v55 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v54, <8 x double> %v47, <8 x double> %v50)
  %v56 = fsub <8 x double> %v53, %v47
  %v57 = fsub <8 x double> %v56, %v50
  %v58 = fmul <8 x double> %v30, %v57
  %v59 = fmul <8 x double> splat (double 0x3FEF49F49F49F49F), %v18
  %v60 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC00DDDDDDDDDDDDE), <8 x double> %v41, <8 x double> %v59)
  %v61 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x400C71C71C71C71C), <8 x double> %v55, <8 x double> %v60)
  %v62 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v61, <8 x double> %v21)
  %v63 = fmul <8 x double> splat (double 0x3FEF49F49F49F49F), %v24
  %v64 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC00DDDDDDDDDDDDE), <8 x double> %v44, <8 x double> %v63)
  %v65 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x400C71C71C71C71C), <8 x double> %v58, <8 x double> %v64)
  %v66 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v65, <8 x double> %v27)
  %v67 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FE999999999999A), <8 x double> %v16, <8 x double> %v2)
  %v68 = fsub <8 x double> %v67, %v33
  %v69 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v36, <8 x double> %v68, <8 x double> %v38)
  %v70 = fneg <8 x double> %v62
  %v71 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v70, <8 x double> %v62, <8 x double> %v66)
  %v72 = fsub <8 x double> %v69, %v62
  %v73 = fsub <8 x double> %v72, %v66
  %v74 = fmul <8 x double> %v30, %v73
  %v75 = fmul <8 x double> splat (double 0x40079EEC0FC37181), %v18
  %v76 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC027310BD29520E4), <8 x double> %v41, <8 x double> %v75)
  %v77 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4023A552363C5290), <8 x double> %v55, <8 x double> %v76)
  %v78 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD29C9EBA1E3345), <8 x double> %v71, <8 x double> %v77)
  %v79 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v78, <8 x double> %v21)
  %v80 = fmul <8 x double> splat (double 0x40079EEC0FC37181), %v24
  %v81 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC027310BD29520E4), <8 x double> %v44, <8 x double> %v80)
  %v82 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4023A552363C5290), <8 x double> %v58, <8 x double> %v81)
  %v83 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD29C9EBA1E3345), <8 x double> %v74, <8 x double> %v82)
  %v84 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v83, <8 x double> %v27)
  %v85 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FEC71C71C71C71C), <8 x double> %v16, <8 x double> %v2)
  %v86 = fsub <8 x double> %v85, %v33
  %v87 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v36, <8 x double> %v86, <8 x double> %v38)
  %v88 = fneg <8 x double> %v79
  %v89 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v88, <8 x double> %v79, <8 x double> %v84)
  %v90 = fsub <8 x double> %v87, %v79
  %v91 = fsub <8 x double> %v90, %v84
  %v92 = fmul <8 x double> %v30, %v91
  %v93 = fmul <8 x double> splat (double 0x4006C52BF5A814B0), %v18
  %v94 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC02583E0F83E0F84), <8 x double> %v41, <8 x double> %v93)
  %v95 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4021D016A3721E8B), <8 x double> %v55, <8 x double> %v94)
  %v96 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD1D1745D1745D1), <8 x double> %v71, <8 x double> %v95)
  %v97 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD1818970D9CC2F), <8 x double> %v89, <8 x double> %v96)
  %v98 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v97, <8 x double> %v21)
  %v99 = fmul <8 x double> splat (double 0x4006C52BF5A814B0), %v24
  %v100 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC02583E0F83E0F84), <8 x double> %v44, <8 x double> %v99)
  %v101 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4021D016A3721E8B), <8 x double> %v58, <8 x double> %v100)
  %v102 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD1D1745D1745D1), <8 x double> %v74, <8 x double> %v101)
  %v103 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD1818970D9CC2F), <8 x double> %v92, <8 x double> %v102)
  %v104 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v103, <8 x double> %v27)
  %v105 = fsub <8 x double> %v15, %v33
  %v106 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v36, <8 x double> %v105, <8 x double> %v38)
  %v107 = fneg <8 x double> %v98
  %v108 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v107, <8 x double> %v98, <8 x double> %v104)
  %v109 = fsub <8 x double> %v106, %v98
  %v110 = fsub <8 x double> %v109, %v104
  %v111 = fmul <8 x double> %v30, %v110
  %v112 = fmul <8 x double> splat (double 0x3FB7555555555555), %v18
  %v113 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FDCC0499A5605FB), <8 x double> %v55, <8 x double> %v112)
  %v114 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FE4D55555555555), <8 x double> %v71, <8 x double> %v113)
  %v115 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD4A1CFB2B78C13), <8 x double> %v89, <8 x double> %v114)
  %v116 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC0C30C30C30C31), <8 x double> %v108, <8 x double> %v115)
  %v117 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v116, <8 x double> %v21)
  %v118 = fmul <8 x double> splat (double 0x3FB7555555555555), %v24
  %v119 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FDCC0499A5605FB), <8 x double> %v58, <8 x double> %v118)
  %v120 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FE4D55555555555), <8 x double> %v74, <8 x double> %v119)
  %v121 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD4A1CFB2B78C13), <8 x double> %v92, <8 x double> %v120)
  %v122 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC0C30C30C30C31), <8 x double> %v111, <8 x double> %v121)
  %v123 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v122, <8 x double> %v27)
  %v124 = fsub <8 x double> %v15, %v33
  %v125 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v36, <8 x double> %v124, <8 x double> %v38)
  %v126 = fneg <8 x double> %v117
  %v127 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v126, <8 x double> %v117, <8 x double> %v123)
  %v128 = fsub <8 x double> %v125, %v117
  %v129 = fsub <8 x double> %v128, %v123
  %v130 = fmul <8 x double> %v30, %v129
  ; error in units of the tolerance, squared, averaged over the states
  %v131 = getelementptr inbounds <8 x double>, ptr %settings, i64 0
  %v132 = load <8 x double>, ptr %v131, align 64
  %v133 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v21)
  %v134 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v117)
  %v135 = fcmp ogt <8 x double> %v133, %v134
  %v136 = select <8 x i1> %v135, <8 x double> %v133, <8 x double> %v134
  %v137 = getelementptr inbounds <8 x double>, ptr %settings, i64 9
  %v138 = load <8 x double>, ptr %v137, align 64
  %v139 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v132, <8 x double> %v136, <8 x double> %v138)
  %v140 = fmul <8 x double> splat (double 0x3F54320FEDCBA987), %v18
  %v141 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF716B5A550ABFC4), <8 x double> %v55, <8 x double> %v140)
  %v142 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA2EEEEEEEEEEEF), <8 x double> %v71, <8 x double> %v141)
  %v143 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFAA0AD1D2CA1858), <8 x double> %v89, <8 x double> %v142)
  %v144 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA5748A7BDAF0E2), <8 x double> %v108, <8 x double> %v143)
  %v145 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF9999999999999A), <8 x double> %v127, <8 x double> %v144)
  %v146 = fmul <8 x double> %v16, %v145
  %v147 = fdiv <8 x double> %v146, %v139
  %v148 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v147, <8 x double> %v147, <8 x double> splat (double 0x0000000000000000))
  %v149 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v27)
  %v150 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v123)
  %v151 = fcmp ogt <8 x double> %v149, %v150
  %v152 = select <8 x i1> %v151, <8 x double> %v149, <8 x double> %v150
  %v153 = getelementptr inbounds <8 x double>, ptr %settings, i64 10
  %v154 = load <8 x double>, ptr %v153, align 64
  %v155 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v132, <8 x double> %v152, <8 x double> %v154)
  %v156 = fmul <8 x double> splat (double 0x3F54320FEDCBA987), %v24
  %v157 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF716B5A550ABFC4), <8 x double> %v58, <8 x double> %v156)
  %v158 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA2EEEEEEEEEEEF), <8 x double> %v74, <8 x double> %v157)
  %v159 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFAA0AD1D2CA1858), <8 x double> %v92, <8 x double> %v158)
  %v160 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA5748A7BDAF0E2), <8 x double> %v111, <8 x double> %v159)
  %v161 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF9999999999999A), <8 x double> %v130, <8 x double> %v160)
  %v162 = fmul <8 x double> %v16, %v161
  %v163 = fdiv <8 x double> %v162, %v155
  %v164 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v163, <8 x double> %v163, <8 x double> %v148)
  %v165 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v117, <8 x double> splat (double 0x0000000000000000), <8 x double> splat (double 0x0000000000000000))
  %v166 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v127, <8 x double> splat (double 0x0000000000000000), <8 x double> %v165)
  %v167 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v123, <8 x double> splat (double 0x0000000000000000), <8 x double> %v166)
  %v168 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v130, <8 x double> splat (double 0x0000000000000000), <8 x double> %v167)
  %v169 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v164, <8 x double> splat (double 0x3FE0000000000000), <8 x double> %v168)
  ; accepted or refused, and the next length
  %v170 = getelementptr inbounds <8 x double>, ptr %lanes, i64 10
  %v171 = load <8 x double>, ptr %v170, align 64
  %v172 = fcmp ogt <8 x double> %v171, splat (double 0x0000000000000000)
  %v173 = fcmp ole <8 x double> %v169, splat (double 0x3FF0000000000000)
  %v174 = and <8 x i1> %v172, %v173
  %v175 = fcmp olt <8 x double> %v169, splat (double 0x46293E5939A08CEA)
  %v176 = select <8 x i1> %v175, <8 x double> %v169, <8 x double> splat (double 0x46293E5939A08CEA)
  %v177 = fcmp ogt <8 x double> %v176, splat (double 0x39B4484BFEEBC2A0)
  %v178 = select <8 x i1> %v177, <8 x double> %v176, <8 x double> splat (double 0x39B4484BFEEBC2A0)
  %v179 = bitcast <8 x double> %v178 to <8 x i64>
  %v180 = lshr <8 x i64> %v179, splat (i64 52)
  %v181 = or <8 x i64> %v180, splat (i64 4841369599423283200)
  %v182 = bitcast <8 x i64> %v181 to <8 x double>
  %v183 = fsub <8 x double> %v182, splat (double 0x43300000000003FF)
  %v184 = and <8 x i64> %v179, splat (i64 4503599627370495)
  %v185 = or <8 x i64> %v184, splat (i64 4607182418800017408)
  %v186 = bitcast <8 x i64> %v185 to <8 x double>
  %v187 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA604C059210386), <8 x double> %v186, <8 x double> splat (double 0xBFD9C2C7904CE9BE))
  %v188 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v187, <8 x double> %v186, <8 x double> splat (double 0x3FF96E7C9A8551E4))
  %v189 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v188, <8 x double> %v186, <8 x double> splat (double 0xC00BEB4578B01506))
  %v190 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v189, <8 x double> %v186, <8 x double> splat (double 0x401431010187BF7D))
  %v191 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v190, <8 x double> %v186, <8 x double> splat (double 0xC0064DAC40654ADD))
  %v192 = fadd <8 x double> %v183, %v191
  %v193 = getelementptr inbounds <8 x double>, ptr %lanes, i64 6
  %v194 = load <8 x double>, ptr %v193, align 64
  %v195 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v194, <8 x double> splat (double 0x3F947AE147AE147B), <8 x double> splat (double 0xBFC374D65D9E608D))
  %v196 = select <8 x i1> %v174, <8 x double> %v195, <8 x double> splat (double 0xBFC374D65D9E608D)
  %v197 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v192, <8 x double> splat (double 0xBFB5C28F5C28F5C3), <8 x double> %v196)
  %v198 = getelementptr inbounds <8 x double>, ptr %lanes, i64 7
  %v199 = load <8 x double>, ptr %v198, align 64
  %v200 = fcmp ogt <8 x double> %v199, splat (double 0x0000000000000000)
  %v201 = xor <8 x i1> %v174, splat (i1 true)
  %v202 = or <8 x i1> %v200, %v201
  %v203 = select <8 x i1> %v202, <8 x double> splat (double 0x0000000000000000), <8 x double> splat (double 0x400A934F0979A371)
  %v204 = fcmp olt <8 x double> %v197, %v203
  %v205 = select <8 x i1> %v204, <8 x double> %v197, <8 x double> %v203
  %v206 = fcmp ogt <8 x double> %v205, splat (double 0xC002934F0979A371)
  %v207 = select <8 x i1> %v206, <8 x double> %v205, <8 x double> splat (double 0xC002934F0979A371)
  %v208 = fadd <8 x double> %v207, splat (double 0x4338000000000000)
  %v209 = fsub <8 x double> %v208, splat (double 0x4338000000000000)
  %v210 = fsub <8 x double> %v207, %v209
  %v211 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F83CBFA3EF5DF15), <8 x double> %v210, <8 x double> splat (double 0x3FACA1CEF240FA9C))
  %v212 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v211, <8 x double> %v210, <8 x double> splat (double 0x3FCEBFA4C61D8623))
  %v213 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v212, <8 x double> %v210, <8 x double> splat (double 0x3FE62E0C17657753))
  %v214 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v213, <8 x double> %v210, <8 x double> splat (double 0x3FF0000000000000))
  %v215 = bitcast <8 x double> %v208 to <8 x i64>
  %v216 = shl <8 x i64> %v215, splat (i64 52)
  %v217 = bitcast <8 x double> %v214 to <8 x i64>
  %v218 = add <8 x i64> %v217, %v216
  %v219 = bitcast <8 x i64> %v218 to <8 x double>
  %v220 = fmul <8 x double> %v16, %v219
  %v221 = fcmp oge <8 x double> %v219, splat (double 0x3FF0000000000000)
  %v222 = fcmp ogt <8 x double> %v4, %v220
  %v223 = and <8 x i1> %v221, %v222
  %v224 = and <8 x i1> %v174, %v223
  %v225 = select <8 x i1> %v224, <8 x double> %v4, <8 x double> %v220
  %v226 = fcmp ogt <8 x double> %v192, splat (double 0xC03A934F0979A371)
  %v227 = select <8 x i1> %v226, <8 x double> %v192, <8 x double> splat (double 0xC03A934F0979A371)
  ; what the lane is now
  %v228 = fcmp ogt <8 x double> %v171, splat (double 0x0000000000000000)
  %v229 = xor <8 x i1> %v174, splat (i1 true)
  %v230 = and <8 x i1> %v228, %v229
  %v231 = select <8 x i1> %v174, <8 x double> %v15, <8 x double> %v2
  %v232 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  store <8 x double> %v231, ptr %v232, align 64
  %v233 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  %v234 = load <8 x double>, ptr %v233, align 64
  %v235 = select <8 x i1> %v174, <8 x double> %v2, <8 x double> %v234
  %v236 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  store <8 x double> %v235, ptr %v236, align 64
  %v237 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  %v238 = load <8 x double>, ptr %v237, align 64
  %v239 = select <8 x i1> %v174, <8 x double> %v16, <8 x double> %v238
  %v240 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  store <8 x double> %v239, ptr %v240, align 64
  %v241 = select <8 x i1> %v174, <8 x double> %v227, <8 x double> %v194
  %v242 = getelementptr inbounds <8 x double>, ptr %lanes, i64 6
  store <8 x double> %v241, ptr %v242, align 64
  %v243 = getelementptr inbounds <8 x double>, ptr %lanes, i64 1
  store <8 x double> %v225, ptr %v243, align 64
  %v244 = select <8 x i1> %v230, <8 x double> splat (double 0x3FF0000000000000), <8 x double> splat (double 0x0000000000000000)
  %v245 = getelementptr inbounds <8 x double>, ptr %lanes, i64 7
  store <8 x double> %v244, ptr %v245, align 64
  %v246 = getelementptr inbounds <8 x double>, ptr %lanes, i64 14
  %v247 = load <8 x double>, ptr %v246, align 64
  %v248 = fmul <8 x double> %v247, splat (double 0x3FE0000000000000)
  %v249 = select <8 x i1> %v174, <8 x double> %v248, <8 x double> %v247
  %v250 = fcmp olt <8 x double> %v169, splat (double 0x7FF0000000000000)
  %v251 = select <8 x i1> %v250, <8 x double> %v249, <8 x double> splat (double 0x3FF0000000000000)
  %v252 = getelementptr inbounds <8 x double>, ptr %lanes, i64 14
  store <8 x double> %v251, ptr %v252, align 64
  %v253 = getelementptr inbounds <8 x double>, ptr %lanes, i64 8
  %v254 = load <8 x double>, ptr %v253, align 64
  %v255 = select <8 x i1> %v174, <8 x double> splat (double 0x3FF0000000000000), <8 x double> splat (double 0x0000000000000000)
  %v256 = fadd <8 x double> %v254, %v255
  %v257 = getelementptr inbounds <8 x double>, ptr %lanes, i64 9
  %v258 = load <8 x double>, ptr %v257, align 64
  %v259 = select <8 x i1> %v230, <8 x double> splat (double 0x3FF0000000000000), <8 x double> splat (double 0x0000000000000000)
  %v260 = fadd <8 x double> %v258, %v259
  %v261 = getelementptr inbounds <8 x double>, ptr %lanes, i64 8
  store <8 x double> %v256, ptr %v261, align 64
  %v262 = getelementptr inbounds <8 x double>, ptr %lanes, i64 9
  store <8 x double> %v260, ptr %v262, align 64
  ; who needs attention
  %v263 = and <8 x i1> %v174, %v9
  %v264 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v2)
  %v265 = getelementptr inbounds <8 x double>, ptr %settings, i64 2
  %v266 = load <8 x double>, ptr %v265, align 64
  %v267 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3CF0000000000000), <8 x double> %v264, <8 x double> %v266)
  %v268 = fcmp olt <8 x double> %v225, %v267
  %v269 = fadd <8 x double> %v256, %v260
  %v270 = getelementptr inbounds <8 x double>, ptr %settings, i64 1
  %v271 = load <8 x double>, ptr %v270, align 64
  %v272 = fcmp oge <8 x double> %v269, %v271
  %v273 = fcmp ogt <8 x double> %v171, splat (double 0x0000000000000000)
  %v274 = xor <8 x i1> %v263, splat (i1 true)
  %v275 = and <8 x i1> %v273, %v274
  %v276 = or <8 x i1> %v268, %v272
  %v277 = and <8 x i1> %v275, %v276
  %v278 = getelementptr inbounds <8 x double>, ptr %settings, i64 11
  %v279 = load <8 x double>, ptr %v278, align 64
  %v280 = fcmp olt <8 x double> %v117, %v279
  %v281 = or <8 x i1> zeroinitializer, %v280
  %v282 = getelementptr inbounds <8 x double>, ptr %settings, i64 13
  %v283 = load <8 x double>, ptr %v282, align 64
  %v284 = fcmp ogt <8 x double> %v117, %v283
  %v285 = or <8 x i1> %v281, %v284
  %v286 = getelementptr inbounds <8 x double>, ptr %settings, i64 12
  %v287 = load <8 x double>, ptr %v286, align 64
  %v288 = fcmp olt <8 x double> %v123, %v287
  %v289 = or <8 x i1> %v285, %v288
  %v290 = getelementptr inbounds <8 x double>, ptr %settings, i64 14
  %v291 = load <8 x double>, ptr %v290, align 64
  %v292 = fcmp ogt <8 x double> %v123, %v291
  %v293 = or <8 x i1> %v289, %v292
  %v294 = and <8 x i1> %v174, %v293
  %v295 = or <8 x i1> %v277, %v294
  %v296 = getelementptr inbounds <8 x double>, ptr %lanes, i64 3
  %v297 = load <8 x double>, ptr %v296, align 64
  %v298 = fcmp olt <8 x double> %v297, %v15
  %v299 = fcmp ole <8 x double> %v297, %v15
  %v300 = or <8 x i1> %v263, %v295
  %v301 = select <8 x i1> %v300, <8 x i1> %v298, <8 x i1> %v299
  %v302 = and <8 x i1> %v174, %v301
  %v303 = bitcast <8 x i1> %v263 to i8
  %v304 = zext i8 %v303 to i64
  %v305 = bitcast <8 x i1> %v295 to i8
  %v306 = zext i8 %v305 to i64
  %v307 = fadd <8 x double> %v256, splat (double 0x4358000000000000)
  %v308 = fsub <8 x double> %v307, splat (double 0x4358000000000000)
  %v309 = getelementptr inbounds <8 x double>, ptr %lanes, i64 29
  %v310 = load <8 x double>, ptr %v309, align 64
  %v311 = fcmp ogt <8 x double> %v310, splat (double 0x0000000000000000)
  %v312 = fcmp oeq <8 x double> %v308, %v256
  %v313 = or <8 x i1> %v312, %v311
  %v314 = and <8 x i1> %v174, %v313
  %v315 = bitcast <8 x i1> %v314 to i8
  %v316 = icmp ne i8 %v315, 0
  br i1 %v316, label %suspect, label %judged
suspect:
  %v317 = fsub <8 x double> %v127, %v108
  %v318 = getelementptr inbounds <8 x double>, ptr %settings, i64 15
  %v319 = load <8 x double>, ptr %v318, align 64
  %v320 = fmul <8 x double> %v317, %v319
  %v321 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v320, <8 x double> %v320, <8 x double> splat (double 0x0000000000000000))
  %v322 = fsub <8 x double> %v130, %v111
  %v323 = getelementptr inbounds <8 x double>, ptr %settings, i64 16
  %v324 = load <8 x double>, ptr %v323, align 64
  %v325 = fmul <8 x double> %v322, %v324
  %v326 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v325, <8 x double> %v325, <8 x double> %v321)
  %v327 = fmul <8 x double> splat (double 0xC0060A814AFD6A05), %v18
  %v328 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x402583E0F83E0F84), <8 x double> %v41, <8 x double> %v327)
  %v329 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC020EA14569F6E5B), <8 x double> %v55, <8 x double> %v328)
  %v330 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD7D9364D9364D9), <8 x double> %v71, <8 x double> %v329)
  %v331 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFA902320EEDFF1F), <8 x double> %v89, <8 x double> %v330)
  %v332 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC0C30C30C30C31), <8 x double> %v108, <8 x double> %v331)
  %v333 = fmul <8 x double> %v332, %v319
  %v334 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v333, <8 x double> %v333, <8 x double> splat (double 0x0000000000000000))
  %v335 = fmul <8 x double> splat (double 0xC0060A814AFD6A05), %v24
  %v336 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x402583E0F83E0F84), <8 x double> %v44, <8 x double> %v335)
  %v337 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC020EA14569F6E5B), <8 x double> %v58, <8 x double> %v336)
  %v338 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD7D9364D9364D9), <8 x double> %v74, <8 x double> %v337)
  %v339 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFA902320EEDFF1F), <8 x double> %v92, <8 x double> %v338)
  %v340 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC0C30C30C30C31), <8 x double> %v111, <8 x double> %v339)
  %v341 = fmul <8 x double> %v340, %v324
  %v342 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v341, <8 x double> %v341, <8 x double> %v334)
  %v343 = fmul <8 x double> splat (double 0x401B0A3D70A3D70B), %v342
  %v344 = fcmp ogt <8 x double> %v326, %v343
  %v345 = getelementptr inbounds <8 x double>, ptr %lanes, i64 30
  %v346 = load <8 x double>, ptr %v345, align 64
  %v347 = fadd <8 x double> %v346, splat (double 0x3FF0000000000000)
  %v348 = select <8 x i1> %v344, <8 x double> splat (double 0x0000000000000000), <8 x double> %v347
  %v349 = fadd <8 x double> %v310, splat (double 0x3FF0000000000000)
  %v350 = fcmp oge <8 x double> %v348, splat (double 0x4018000000000000)
  %v351 = select <8 x i1> %v350, <8 x double> splat (double 0x0000000000000000), <8 x double> %v310
  %v352 = select <8 x i1> %v344, <8 x double> %v349, <8 x double> %v351
  %v353 = getelementptr inbounds <8 x double>, ptr %lanes, i64 31
  %v354 = load <8 x double>, ptr %v353, align 64
  %v355 = fcmp oge <8 x double> %v352, %v354
  %v356 = and <8 x i1> %v314, %v355
  %v357 = select <8 x i1> %v356, <8 x double> splat (double 0x0000000000000000), <8 x double> %v348
  %v358 = select <8 x i1> %v314, <8 x double> %v357, <8 x double> %v346
  %v359 = getelementptr inbounds <8 x double>, ptr %lanes, i64 30
  store <8 x double> %v358, ptr %v359, align 64
  %v360 = select <8 x i1> %v356, <8 x double> splat (double 0x0000000000000000), <8 x double> %v352
  %v361 = select <8 x i1> %v314, <8 x double> %v360, <8 x double> %v310
  %v362 = getelementptr inbounds <8 x double>, ptr %lanes, i64 29
  store <8 x double> %v361, ptr %v362, align 64
  %v363 = getelementptr inbounds <8 x double>, ptr %lanes, i64 32
  %v364 = load <8 x double>, ptr %v363, align 64
  %v365 = select <8 x i1> %v356, <8 x double> splat (double 0x0000000000000000), <8 x double> %v364
  %v366 = getelementptr inbounds <8 x double>, ptr %lanes, i64 32
  store <8 x double> %v365, ptr %v366, align 64
  %v367 = getelementptr inbounds <8 x double>, ptr %lanes, i64 33
  %v368 = load <8 x double>, ptr %v367, align 64
  %v369 = select <8 x i1> %v356, <8 x double> %v15, <8 x double> %v368
  %v370 = getelementptr inbounds <8 x double>, ptr %lanes, i64 33
  store <8 x double> %v369, ptr %v370, align 64
  %v371 = getelementptr inbounds <8 x double>, ptr %lanes, i64 34
  %v372 = load <8 x double>, ptr %v371, align 64
  %v373 = select <8 x i1> %v356, <8 x double> %v16, <8 x double> %v372
  %v374 = getelementptr inbounds <8 x double>, ptr %lanes, i64 34
  store <8 x double> %v373, ptr %v374, align 64
  %v375 = bitcast <8 x i1> %v356 to i8
  %v376 = zext i8 %v375 to i64
  %v377 = shl i64 %v376, 16
  br label %judged
judged:
  %v378 = phi i64 [ 0, %entry ], [ %v377, %suspect ]
  %v379 = bitcast <8 x i1> %v302 to i8
  %v380 = icmp ne i8 %v379, 0
  br i1 %v380, label %curve, label %move
curve:
  %v381 = fsub <8 x double> %v117, %v21
  %v382 = fneg <8 x double> %v381
  %v383 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v18, <8 x double> %v382)
  %v384 = fneg <8 x double> %v16
  %v385 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v384, <8 x double> %v127, <8 x double> %v381)
  %v386 = fsub <8 x double> %v385, %v383
  %v387 = fmul <8 x double> splat (double 0xBFF208439215A046), %v18
  %v388 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40056744F3B9A987), <8 x double> %v55, <8 x double> %v387)
  %v389 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC016BDFAC7A2320C), <8 x double> %v71, <8 x double> %v388)
  %v390 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x400C2CEAE0978C92), <8 x double> %v89, <8 x double> %v389)
  %v391 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFFC46C8B61F95E5), <8 x double> %v108, <8 x double> %v390)
  %v392 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40030F4BDF0DC914), <8 x double> %v127, <8 x double> %v391)
  %v393 = fmul <8 x double> %v16, %v392
  %v394 = getelementptr inbounds <8 x double>, ptr %lanes, i64 37
  store <8 x double> %v21, ptr %v394, align 64
  %v395 = getelementptr inbounds <8 x double>, ptr %lanes, i64 39
  store <8 x double> %v381, ptr %v395, align 64
  %v396 = getelementptr inbounds <8 x double>, ptr %lanes, i64 41
  store <8 x double> %v383, ptr %v396, align 64
  %v397 = getelementptr inbounds <8 x double>, ptr %lanes, i64 43
  store <8 x double> %v386, ptr %v397, align 64
  %v398 = getelementptr inbounds <8 x double>, ptr %lanes, i64 45
  store <8 x double> %v393, ptr %v398, align 64
  %v399 = fsub <8 x double> %v123, %v27
  %v400 = fneg <8 x double> %v399
  %v401 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v24, <8 x double> %v400)
  %v402 = fneg <8 x double> %v16
  %v403 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v402, <8 x double> %v130, <8 x double> %v399)
  %v404 = fsub <8 x double> %v403, %v401
  %v405 = fmul <8 x double> splat (double 0xBFF208439215A046), %v24
  %v406 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40056744F3B9A987), <8 x double> %v58, <8 x double> %v405)
  %v407 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC016BDFAC7A2320C), <8 x double> %v74, <8 x double> %v406)
  %v408 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x400C2CEAE0978C92), <8 x double> %v92, <8 x double> %v407)
  %v409 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFFC46C8B61F95E5), <8 x double> %v111, <8 x double> %v408)
  %v410 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40030F4BDF0DC914), <8 x double> %v130, <8 x double> %v409)
  %v411 = fmul <8 x double> %v16, %v410
  %v412 = getelementptr inbounds <8 x double>, ptr %lanes, i64 38
  store <8 x double> %v27, ptr %v412, align 64
  %v413 = getelementptr inbounds <8 x double>, ptr %lanes, i64 40
  store <8 x double> %v399, ptr %v413, align 64
  %v414 = getelementptr inbounds <8 x double>, ptr %lanes, i64 42
  store <8 x double> %v401, ptr %v414, align 64
  %v415 = getelementptr inbounds <8 x double>, ptr %lanes, i64 44
  store <8 x double> %v404, ptr %v415, align 64
  %v416 = getelementptr inbounds <8 x double>, ptr %lanes, i64 46
  store <8 x double> %v411, ptr %v416, align 64
  br label %move
move:
  %v417 = select <8 x i1> %v174, <8 x double> %v117, <8 x double> %v21
  %v418 = select <8 x i1> %v174, <8 x double> %v127, <8 x double> %v18
  %v419 = getelementptr inbounds <8 x double>, ptr %lanes, i64 22
  store <8 x double> %v417, ptr %v419, align 64
  %v420 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  store <8 x double> %v418, ptr %v420, align 64
  %v421 = getelementptr inbounds <8 x double>, ptr %lanes, i64 26
  %v422 = load <8 x double>, ptr %v421, align 64
  %v423 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v417)
  %v424 = fcmp ogt <8 x double> %v422, %v423
  %v425 = select <8 x i1> %v424, <8 x double> %v422, <8 x double> %v423
  %v426 = getelementptr inbounds <8 x double>, ptr %lanes, i64 26
  store <8 x double> %v425, ptr %v426, align 64
  %v427 = select <8 x i1> %v174, <8 x double> %v123, <8 x double> %v27
  %v428 = select <8 x i1> %v174, <8 x double> %v130, <8 x double> %v24
  %v429 = getelementptr inbounds <8 x double>, ptr %lanes, i64 23
  store <8 x double> %v427, ptr %v429, align 64
  %v430 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  store <8 x double> %v428, ptr %v430, align 64
  %v431 = getelementptr inbounds <8 x double>, ptr %lanes, i64 27
  %v432 = load <8 x double>, ptr %v431, align 64
  %v433 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v427)
  %v434 = fcmp ogt <8 x double> %v432, %v433
  %v435 = select <8 x i1> %v434, <8 x double> %v432, <8 x double> %v433
  %v436 = getelementptr inbounds <8 x double>, ptr %lanes, i64 27
  store <8 x double> %v435, ptr %v436, align 64
  %v437 = or i64 %v304, %v306
  br i1 %v380, label %observe, label %judge
observe:
  %v438 = bitcast <8 x i1> %v302 to i8
  %v439 = zext i8 %v438 to i64
  %v440 = call i64 @uq_observe(ptr %lanes, ptr %settings, i64 %v439, i64 %v437)
  br label %judge
judge:
  %v441 = phi i64 [ 0, %move ], [ %v440, %observe ]
  %v442 = trunc i64 %v441 to i8
  %v443 = bitcast i8 %v442 to <8 x i1>
  %v444 = or <8 x i1> %v294, %v443
  %v445 = or <8 x i1> %v277, %v444
  %v446 = bitcast <8 x i1> %v445 to i8
  %v447 = zext i8 %v446 to i64
  %v448 = bitcast <8 x i1> %v445 to i8
  %v449 = icmp ne i8 %v448, 0
  br i1 %v449, label %failure, label %done
failure:
  %v450 = fcmp ogt <8 x double> %v251, splat (double 0x3F50000000000000)
  %v451 = select <8 x i1> %v450, <8 x double> splat (double 0x4008000000000000), <8 x double> splat (double 0x401C000000000000)
  %v452 = fmul <8 x double> %v267, splat (double 0x40C3880000000000)
  %v453 = getelementptr inbounds <8 x double>, ptr %settings, i64 3
  %v454 = load <8 x double>, ptr %v453, align 64
  %v455 = fmul <8 x double> %v417, %v418
  %v456 = fcmp ogt <8 x double> %v455, splat (double 0x0000000000000000)
  %v457 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v417)
  %v458 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v418)
  %v459 = fmul <8 x double> %v452, %v458
  %v460 = fcmp ole <8 x double> %v457, %v459
  %v461 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v417)
  %v462 = fcmp ogt <8 x double> %v461, splat (double 0x5F138D352E5096AF)
  %v463 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v417)
  %v464 = fmul <8 x double> %v132, %v463
  %v465 = fmul <8 x double> %v138, splat (double 0x412E848000000000)
  %v466 = fcmp ogt <8 x double> %v464, %v465
  %v467 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v417)
  %v468 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v418)
  %v469 = fmul <8 x double> %v454, %v468
  %v470 = fcmp ole <8 x double> %v467, %v469
  %v471 = and <8 x i1> %v466, %v470
  %v472 = or <8 x i1> %v460, %v462
  %v473 = or <8 x i1> %v472, %v471
  %v474 = and <8 x i1> %v456, %v473
  %v475 = or <8 x i1> zeroinitializer, %v474
  %v476 = fmul <8 x double> %v427, %v428
  %v477 = fcmp ogt <8 x double> %v476, splat (double 0x0000000000000000)
  %v478 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v427)
  %v479 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v428)
  %v480 = fmul <8 x double> %v452, %v479
  %v481 = fcmp ole <8 x double> %v478, %v480
  %v482 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v427)
  %v483 = fcmp ogt <8 x double> %v482, splat (double 0x5F138D352E5096AF)
  %v484 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v427)
  %v485 = fmul <8 x double> %v132, %v484
  %v486 = fmul <8 x double> %v154, splat (double 0x412E848000000000)
  %v487 = fcmp ogt <8 x double> %v485, %v486
  %v488 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v427)
  %v489 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v428)
  %v490 = fmul <8 x double> %v454, %v489
  %v491 = fcmp ole <8 x double> %v488, %v490
  %v492 = and <8 x i1> %v487, %v491
  %v493 = or <8 x i1> %v481, %v483
  %v494 = or <8 x i1> %v493, %v492
  %v495 = and <8 x i1> %v477, %v494
  %v496 = or <8 x i1> %v475, %v495
  %v497 = select <8 x i1> %v496, <8 x double> splat (double 0x4010000000000000), <8 x double> %v451
  %v498 = select <8 x i1> %v268, <8 x double> %v497, <8 x double> splat (double 0x4014000000000000)
  %v499 = select <8 x i1> %v444, <8 x double> splat (double 0x4000000000000000), <8 x double> %v498
  %v500 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  store <8 x double> %v499, ptr %v500, align 64
  br label %done
done:
  %v501 = shl i64 %v447, 8
  %v502 = or i64 %v304, %v501
  %v503 = or i64 %v502, %v378
  ret i64 %v503
}

define internal void @uq_linear(ptr %lanes, ptr %settings, <8 x double> %time) #0 {
entry:
  %v1 = getelementptr inbounds <8 x double>, ptr %settings, i64 0
  %v2 = load <8 x double>, ptr %v1, align 64
  br label %loop3
loop3:
  %loop3.i = phi i64 [ 0, %entry ], [ %loop3.next, %loop3 ]
  %loop3.carried = phi i1 [ false, %entry ], [ %loop3.carried, %loop3 ]
  %v4 = add i64 %loop3.i, 22
  %v5 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v4
  %v6 = load <8 x double>, ptr %v5, align 64
  %v7 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v6)
  %v8 = add i64 %loop3.i, 9
  %v9 = getelementptr inbounds <8 x double>, ptr %settings, i64 %v8
  %v10 = load <8 x double>, ptr %v9, align 64
  %v11 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v2, <8 x double> %v7, <8 x double> %v10)
  %v12 = fcmp olt <8 x double> %v11, splat (double 0x54B249AD2594C37D)
  %v13 = select <8 x i1> %v12, <8 x double> %v11, <8 x double> splat (double 0x54B249AD2594C37D)
  %v14 = add i64 %loop3.i, 78
  %v15 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v14
  store <8 x double> %v13, ptr %v15, align 64
  %loop3.next = add nuw nsw i64 %loop3.i, 1
  %v16 = icmp ult i64 %loop3.next, 2
  br i1 %v16, label %loop3, label %loop3.end
loop3.end:
  %v17 = getelementptr inbounds <8 x double>, ptr %lanes, i64 18
  %v18 = load <8 x double>, ptr %v17, align 64
  %v19 = getelementptr inbounds <8 x double>, ptr %lanes, i64 22
  %v20 = load <8 x double>, ptr %v19, align 64
  %v21 = getelementptr inbounds <8 x double>, ptr %lanes, i64 11
  %v22 = load <8 x double>, ptr %v21, align 64
  %v23 = fsub <8 x double> %time, %v22
  %v24 = getelementptr inbounds <8 x double>, ptr %lanes, i64 21
  %v25 = load <8 x double>, ptr %v24, align 64
  %v26 = fadd <8 x double> %v20, %v20
  %v27 = fneg <8 x double> %v26
  %v28 = getelementptr inbounds <8 x double>, ptr %lanes, i64 19
  %v29 = load <8 x double>, ptr %v28, align 64
  %v30 = fmul <8 x double> %v18, %v25
  %v31 = getelementptr inbounds <8 x double>, ptr %lanes, i64 63
  store <8 x double> %v27, ptr %v31, align 64
  %v32 = getelementptr inbounds <8 x double>, ptr %lanes, i64 64
  store <8 x double> splat (double 0x3FF0000000000000), ptr %v32, align 64
  %v33 = getelementptr inbounds <8 x double>, ptr %lanes, i64 65
  store <8 x double> %v29, ptr %v33, align 64
  %v34 = getelementptr inbounds <8 x double>, ptr %lanes, i64 77
  store <8 x double> %v30, ptr %v34, align 64
  %v35 = getelementptr inbounds <8 x double>, ptr %lanes, i64 78
  %v36 = getelementptr inbounds <8 x double>, ptr %lanes, i64 80
  %v37 = getelementptr inbounds <8 x double>, ptr %lanes, i64 82
  %v38 = getelementptr inbounds <8 x double>, ptr %lanes, i64 35
  %v39 = getelementptr inbounds <8 x double>, ptr %lanes, i64 63
  call void @uq_row_sizes(ptr %v39, ptr %v35, ptr %v36)
  call void @uq_times_jacobian(ptr %v39, ptr %v38, ptr %v37)
  br label %loop40
loop40:
  %loop40.i = phi i64 [ 0, %loop3.end ], [ %loop40.next, %loop40 ]
  %loop40.carried = phi <8 x double> [ splat (double 0x0000000000000000), %loop3.end ], [ %v44, %loop40 ]
  %v41 = add i64 %loop40.i, 80
  %v42 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v41
  %v43 = load <8 x double>, ptr %v42, align 64
  %v44 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v43, <8 x double> splat (double 0x0000000000000000), <8 x double> %loop40.carried)
  %loop40.next = add nuw nsw i64 %loop40.i, 1
  %v45 = icmp ult i64 %loop40.next, 2
  br i1 %v45, label %loop40, label %loop40.end
loop40.end:
  %v46 = getelementptr inbounds <8 x double>, ptr %lanes, i64 10
  %v47 = load <8 x double>, ptr %v46, align 64
  %v48 = fcmp ogt <8 x double> %v47, splat (double 0x0000000000000000)
  %v49 = fcmp uno <8 x double> %v44, %v44
  %v50 = and <8 x i1> %v48, %v49
  %v51 = bitcast <8 x i1> %v50 to i8
  %v52 = icmp ne i8 %v51, 0
  br i1 %v52, label %cleanse, label %done
cleanse:
  br label %loop53
loop53:
  %loop53.i = phi i64 [ 0, %cleanse ], [ %loop53.next, %loop53 ]
  %loop53.carried = phi i1 [ false, %cleanse ], [ %loop53.carried, %loop53 ]
  %v54 = add i64 %loop53.i, 63
  %v55 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v54
  %v56 = load <8 x double>, ptr %v55, align 64
  %v57 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v56)
  %v58 = fcmp olt <8 x double> %v57, splat (double 0x7FF0000000000000)
  %v59 = select <8 x i1> %v58, <8 x double> %v56, <8 x double> splat (double 0x0000000000000000)
  %v60 = add i64 %loop53.i, 63
  %v61 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v60
  store <8 x double> %v59, ptr %v61, align 64
  %loop53.next = add nuw nsw i64 %loop53.i, 1
  %v62 = icmp ult i64 %loop53.next, 3
  br i1 %v62, label %loop53, label %loop53.end
loop53.end:
  br label %loop63
loop63:
  %loop63.i = phi i64 [ 0, %loop53.end ], [ %loop63.next, %loop63 ]
  %loop63.carried = phi i1 [ false, %loop53.end ], [ %loop63.carried, %loop63 ]
  %v64 = add i64 %loop63.i, 76
  %v65 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v64
  %v66 = load <8 x double>, ptr %v65, align 64
  %v67 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v66)
  %v68 = fcmp olt <8 x double> %v67, splat (double 0x7FF0000000000000)
  %v69 = select <8 x i1> %v68, <8 x double> %v66, <8 x double> splat (double 0x0000000000000000)
  %v70 = add i64 %loop63.i, 76
  %v71 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v70
  store <8 x double> %v69, ptr %v71, align 64
  %loop63.next = add nuw nsw i64 %loop63.i, 1
  %v72 = icmp ult i64 %loop63.next, 2
  br i1 %v72, label %loop63, label %loop63.end
loop63.end:
  br label %loop73
loop73:
  %loop73.i = phi i64 [ 0, %loop63.end ], [ %loop73.next, %loop73 ]
  %loop73.carried = phi i1 [ false, %loop63.end ], [ %loop73.carried, %loop73 ]
  %v74 = add i64 %loop73.i, 82
  %v75 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v74
  %v76 = load <8 x double>, ptr %v75, align 64
  %v77 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v76)
  %v78 = fcmp olt <8 x double> %v77, splat (double 0x7FF0000000000000)
  %v79 = select <8 x i1> %v78, <8 x double> %v76, <8 x double> splat (double 0x0000000000000000)
  %v80 = add i64 %loop73.i, 82
  %v81 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v80
  store <8 x double> %v79, ptr %v81, align 64
  %loop73.next = add nuw nsw i64 %loop73.i, 1
  %v82 = icmp ult i64 %loop73.next, 2
  br i1 %v82, label %loop73, label %loop73.end
loop73.end:
  br label %loop83
loop83:
  %loop83.i = phi i64 [ 0, %loop73.end ], [ %loop83.next, %loop83 ]
  %loop83.carried = phi i1 [ false, %loop73.end ], [ %loop83.carried, %loop83 ]
  %v84 = add i64 %loop83.i, 80
  %v85 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v84
  %v86 = load <8 x double>, ptr %v85, align 64
  %v87 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v86)
  %v88 = fcmp olt <8 x double> %v87, splat (double 0x7FF0000000000000)
  %v89 = select <8 x i1> %v88, <8 x double> %v86, <8 x double> splat (double 0x7E37E43C8800759C)
  %v90 = add i64 %loop83.i, 80
  %v91 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v90
  store <8 x double> %v89, ptr %v91, align 64
  %loop83.next = add nuw nsw i64 %loop83.i, 1
  %v92 = icmp ult i64 %loop83.next, 2
  br i1 %v92, label %loop83, label %loop83.end
loop83.end:
  br label %done
done:
  ret void
}

define internal void @uq_times_jacobian(ptr readonly %values, ptr readonly %from, ptr %to) #0 {
entry:
  %v1 = getelementptr inbounds <8 x double>, ptr %values, i64 0
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = getelementptr inbounds <8 x double>, ptr %from, i64 0
  %v4 = load <8 x double>, ptr %v3, align 64
  %v5 = fmul <8 x double> %v2, %v4
  %v6 = getelementptr inbounds <8 x double>, ptr %values, i64 1
  %v7 = load <8 x double>, ptr %v6, align 64
  %v8 = getelementptr inbounds <8 x double>, ptr %from, i64 1
  %v9 = load <8 x double>, ptr %v8, align 64
  %v10 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v7, <8 x double> %v9, <8 x double> %v5)
  %v11 = getelementptr inbounds <8 x double>, ptr %values, i64 2
  %v12 = load <8 x double>, ptr %v11, align 64
  %v13 = fmul <8 x double> %v12, %v4
  %v14 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v12, <8 x double> %v9, <8 x double> %v13)
  %v15 = getelementptr inbounds <8 x double>, ptr %to, i64 0
  store <8 x double> %v10, ptr %v15, align 64
  %v16 = getelementptr inbounds <8 x double>, ptr %to, i64 1
  store <8 x double> %v14, ptr %v16, align 64
  ret void
}

define internal void @uq_row_sizes(ptr readonly %values, ptr readonly %from, ptr %to) #0 {
entry:
  %v1 = getelementptr inbounds <8 x double>, ptr %values, i64 0
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v2)
  %v4 = getelementptr inbounds <8 x double>, ptr %from, i64 0
  %v5 = load <8 x double>, ptr %v4, align 64
  %v6 = fmul <8 x double> %v3, %v5
  %v7 = getelementptr inbounds <8 x double>, ptr %values, i64 1
  %v8 = load <8 x double>, ptr %v7, align 64
  %v9 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v8)
  %v10 = getelementptr inbounds <8 x double>, ptr %from, i64 1
  %v11 = load <8 x double>, ptr %v10, align 64
  %v12 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v9, <8 x double> %v11, <8 x double> %v6)
  %v13 = getelementptr inbounds <8 x double>, ptr %values, i64 2
  %v14 = load <8 x double>, ptr %v13, align 64
  %v15 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v14)
  %v16 = fmul <8 x double> %v15, %v5
  %v17 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v14)
  %v18 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v17, <8 x double> %v11, <8 x double> %v16)
  %v19 = getelementptr inbounds <8 x double>, ptr %to, i64 0
  store <8 x double> %v12, ptr %v19, align 64
  %v20 = getelementptr inbounds <8 x double>, ptr %to, i64 1
  store <8 x double> %v18, ptr %v20, align 64
  ret void
}

define internal i64 @uq_factor(ptr %lanes, <8 x double> %scale) #0 {
entry:
  %v1 = getelementptr inbounds <8 x double>, ptr %lanes, i64 63
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = fsub <8 x double> %scale, %v2
  %v4 = getelementptr inbounds <8 x double>, ptr %lanes, i64 64
  %v5 = load <8 x double>, ptr %v4, align 64
  %v6 = fneg <8 x double> %v5
  %v7 = getelementptr inbounds <8 x double>, ptr %lanes, i64 65
  %v8 = load <8 x double>, ptr %v7, align 64
  %v9 = fneg <8 x double> %v8
  %v10 = fsub <8 x double> %scale, %v8
  %v11 = fdiv <8 x double> splat (double 0x3FF0000000000000), %v3
  %v12 = getelementptr inbounds <8 x double>, ptr %lanes, i64 66
  store <8 x double> %v11, ptr %v12, align 64
  %v13 = fmul <8 x double> %v9, %v11
  %v14 = getelementptr inbounds <8 x double>, ptr %lanes, i64 67
  store <8 x double> %v13, ptr %v14, align 64
  %v15 = fneg <8 x double> %v13
  %v16 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v15, <8 x double> %v6, <8 x double> %v10)
  %v17 = fmul <8 x double> %v6, %v11
  %v18 = getelementptr inbounds <8 x double>, ptr %lanes, i64 68
  store <8 x double> %v17, ptr %v18, align 64
  %v19 = fdiv <8 x double> splat (double 0x3FF0000000000000), %v16
  %v20 = getelementptr inbounds <8 x double>, ptr %lanes, i64 69
  store <8 x double> %v19, ptr %v20, align 64
  %v21 = getelementptr inbounds <8 x double>, ptr %lanes, i64 78
  %v22 = load <8 x double>, ptr %v21, align 64
  %v23 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v3)
  %v24 = fmul <8 x double> %v23, %v22
  %v25 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v6)
  %v26 = getelementptr inbounds <8 x double>, ptr %lanes, i64 79
  %v27 = load <8 x double>, ptr %v26, align 64
  %v28 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v25, <8 x double> %v27, <8 x double> %v24)
  %v29 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v13)
  %v30 = fmul <8 x double> %v29, %v28
  %v31 = getelementptr inbounds <8 x double>, ptr %lanes, i64 80
  %v32 = load <8 x double>, ptr %v31, align 64
  %v33 = call <8 x double> @llvm.fma.v8f64(<8 x double> %scale, <8 x double> %v22, <8 x double> %v32)
  %v34 = fmul <8 x double> splat (double 0x40C3880000000000), %v33
  %v35 = fcmp ole <8 x double> %v28, %v34
  %v36 = xor <8 x i1> %v35, splat (i1 true)
  %v37 = or <8 x i1> zeroinitializer, %v36
  %v38 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v16)
  %v39 = fmul <8 x double> %v38, %v27
  %v40 = fadd <8 x double> %v30, %v39
  %v41 = getelementptr inbounds <8 x double>, ptr %lanes, i64 81
  %v42 = load <8 x double>, ptr %v41, align 64
  %v43 = call <8 x double> @llvm.fma.v8f64(<8 x double> %scale, <8 x double> %v27, <8 x double> %v42)
  %v44 = fmul <8 x double> splat (double 0x40C3880000000000), %v43
  %v45 = fcmp ole <8 x double> %v40, %v44
  %v46 = xor <8 x i1> %v45, splat (i1 true)
  %v47 = or <8 x i1> %v37, %v46
  %v48 = getelementptr inbounds <8 x double>, ptr %lanes, i64 10
  %v49 = load <8 x double>, ptr %v48, align 64
  %v50 = fcmp ogt <8 x double> %v49, splat (double 0x0000000000000000)
  %v51 = and <8 x i1> %v50, %v47
  %v52 = bitcast <8 x i1> %v51 to i8
  %v53 = zext i8 %v52 to i64
  ret i64 %v53
}

define internal void @uq_lines(ptr readonly %lanes, ptr readonly %from, ptr readonly %plus, ptr %to) #0 {
entry:
  %v1 = getelementptr inbounds <8 x double>, ptr %from, i64 0
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = getelementptr inbounds <8 x double>, ptr %plus, i64 0
  %v4 = load <8 x double>, ptr %v3, align 64
  %v5 = fadd <8 x double> %v2, %v4
  %v6 = getelementptr inbounds <8 x double>, ptr %from, i64 1
  %v7 = load <8 x double>, ptr %v6, align 64
  %v8 = getelementptr inbounds <8 x double>, ptr %plus, i64 1
  %v9 = load <8 x double>, ptr %v8, align 64
  %v10 = fadd <8 x double> %v7, %v9
  %v11 = getelementptr inbounds <8 x double>, ptr %lanes, i64 67
  %v12 = load <8 x double>, ptr %v11, align 64
  %v13 = fneg <8 x double> %v12
  %v14 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v13, <8 x double> %v5, <8 x double> %v10)
  %v15 = getelementptr inbounds <8 x double>, ptr %lanes, i64 66
  %v16 = load <8 x double>, ptr %v15, align 64
  %v17 = fmul <8 x double> %v5, %v16
  %v18 = getelementptr inbounds <8 x double>, ptr %lanes, i64 69
  %v19 = load <8 x double>, ptr %v18, align 64
  %v20 = fmul <8 x double> %v14, %v19
  %v21 = getelementptr inbounds <8 x double>, ptr %lanes, i64 68
  %v22 = load <8 x double>, ptr %v21, align 64
  %v23 = fneg <8 x double> %v22
  %v24 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v23, <8 x double> %v20, <8 x double> %v17)
  %v25 = getelementptr inbounds <8 x double>, ptr %to, i64 0
  store <8 x double> %v24, ptr %v25, align 64
  %v26 = getelementptr inbounds <8 x double>, ptr %to, i64 1
  store <8 x double> %v20, ptr %v26, align 64
  ret void
}

define internal i64 @uq_refine(ptr %lanes, <8 x double> %scale, ptr readonly %from, ptr readonly %plus, ptr %k, i64 %grown) #0 {
entry:
  %v1 = trunc i64 %grown to i8
  %v2 = bitcast i8 %v1 to <8 x i1>
  %v3 = getelementptr inbounds <8 x double>, ptr %lanes, i64 63
  %v4 = getelementptr inbounds <8 x double>, ptr %lanes, i64 84
  call void @uq_times_jacobian(ptr %v3, ptr %k, ptr %v4)
  br label %loop5
loop5:
  %loop5.i = phi i64 [ 0, %entry ], [ %loop5.next, %loop5 ]
  %loop5.carried = phi i1 [ false, %entry ], [ %loop5.carried, %loop5 ]
  %v6 = fneg <8 x double> %scale
  %v7 = add i64 %loop5.i, 0
  %v8 = getelementptr inbounds <8 x double>, ptr %k, i64 %v7
  %v9 = load <8 x double>, ptr %v8, align 64
  %v10 = add i64 %loop5.i, 0
  %v11 = getelementptr inbounds <8 x double>, ptr %from, i64 %v10
  %v12 = load <8 x double>, ptr %v11, align 64
  %v13 = add i64 %loop5.i, 0
  %v14 = getelementptr inbounds <8 x double>, ptr %plus, i64 %v13
  %v15 = load <8 x double>, ptr %v14, align 64
  %v16 = fadd <8 x double> %v12, %v15
  %v17 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v6, <8 x double> %v9, <8 x double> %v16)
  %v18 = add i64 %loop5.i, 84
  %v19 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v18
  %v20 = load <8 x double>, ptr %v19, align 64
  %v21 = fadd <8 x double> %v17, %v20
  %v22 = add i64 %loop5.i, 84
  %v23 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v22
  store <8 x double> %v21, ptr %v23, align 64
  %loop5.next = add nuw nsw i64 %loop5.i, 1
  %v24 = icmp ult i64 %loop5.next, 2
  br i1 %v24, label %loop5, label %loop5.end
loop5.end:
  %v25 = getelementptr inbounds <8 x double>, ptr %lanes, i64 84
  %v26 = getelementptr inbounds <8 x double>, ptr %lanes, i64 90
  %v27 = getelementptr inbounds <8 x double>, ptr %lanes, i64 86
  call void @uq_lines(ptr %lanes, ptr %v25, ptr %v26, ptr %v27)
  br label %loop28
loop28:
  %loop28.i = phi i64 [ 0, %loop5.end ], [ %loop28.next, %loop28 ]
  %loop28.carried = phi <8 x double> [ splat (double 0x0000000000000000), %loop5.end ], [ %v48, %loop28 ]
  %v29 = add i64 %loop28.i, 0
  %v30 = getelementptr inbounds <8 x double>, ptr %k, i64 %v29
  %v31 = load <8 x double>, ptr %v30, align 64
  %v32 = add i64 %loop28.i, 86
  %v33 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v32
  %v34 = load <8 x double>, ptr %v33, align 64
  %v35 = fadd <8 x double> %v31, %v34
  %v36 = select <8 x i1> %v2, <8 x double> %v35, <8 x double> %v31
  %v37 = add i64 %loop28.i, 0
  %v38 = getelementptr inbounds <8 x double>, ptr %k, i64 %v37
  store <8 x double> %v36, ptr %v38, align 64
  %v39 = add i64 %loop28.i, 0
  %v40 = getelementptr inbounds <8 x double>, ptr %k, i64 %v39
  %v41 = load <8 x double>, ptr %v40, align 64
  %v42 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v41)
  %v43 = add i64 %loop28.i, 78
  %v44 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v43
  %v45 = load <8 x double>, ptr %v44, align 64
  %v46 = fdiv <8 x double> %v42, %v45
  %v47 = fcmp ogt <8 x double> %v46, %loop28.carried
  %v48 = select <8 x i1> %v47, <8 x double> %v46, <8 x double> %loop28.carried
  %loop28.next = add nuw nsw i64 %loop28.i, 1
  %v49 = icmp ult i64 %loop28.next, 2
  br i1 %v49, label %loop28, label %loop28.end
loop28.end:
  %v50 = fmul <8 x double> splat (double 0x3DDB7CDFD9D7BDBB), %v48
  %v51 = getelementptr inbounds <8 x double>, ptr %lanes, i64 63
  %v52 = getelementptr inbounds <8 x double>, ptr %lanes, i64 84
  call void @uq_times_jacobian(ptr %v51, ptr %k, ptr %v52)
  br label %loop53
loop53:
  %loop53.i = phi i64 [ 0, %loop28.end ], [ %loop53.next, %loop53 ]
  %loop53.carried = phi i1 [ false, %loop28.end ], [ %loop53.carried, %loop53 ]
  %v54 = fneg <8 x double> %scale
  %v55 = add i64 %loop53.i, 0
  %v56 = getelementptr inbounds <8 x double>, ptr %k, i64 %v55
  %v57 = load <8 x double>, ptr %v56, align 64
  %v58 = add i64 %loop53.i, 0
  %v59 = getelementptr inbounds <8 x double>, ptr %from, i64 %v58
  %v60 = load <8 x double>, ptr %v59, align 64
  %v61 = add i64 %loop53.i, 0
  %v62 = getelementptr inbounds <8 x double>, ptr %plus, i64 %v61
  %v63 = load <8 x double>, ptr %v62, align 64
  %v64 = fadd <8 x double> %v60, %v63
  %v65 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v54, <8 x double> %v57, <8 x double> %v64)
  %v66 = add i64 %loop53.i, 84
  %v67 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v66
  %v68 = load <8 x double>, ptr %v67, align 64
  %v69 = fadd <8 x double> %v65, %v68
  %v70 = add i64 %loop53.i, 84
  %v71 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v70
  store <8 x double> %v69, ptr %v71, align 64
  %loop53.next = add nuw nsw i64 %loop53.i, 1
  %v72 = icmp ult i64 %loop53.next, 2
  br i1 %v72, label %loop53, label %loop53.end
loop53.end:
  br label %loop73
loop73:
  %loop73.i = phi i64 [ 0, %loop53.end ], [ %loop73.next, %loop73 ]
  %loop73.carried = phi <8 x double> [ splat (double 0x0000000000000000), %loop53.end ], [ %v87, %loop73 ]
  %v74 = add i64 %loop73.i, 78
  %v75 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v74
  %v76 = load <8 x double>, ptr %v75, align 64
  %v77 = add i64 %loop73.i, 80
  %v78 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v77
  %v79 = load <8 x double>, ptr %v78, align 64
  %v80 = call <8 x double> @llvm.fma.v8f64(<8 x double> %scale, <8 x double> %v76, <8 x double> %v79)
  %v81 = fmul <8 x double> %v80, %v50
  %v82 = add i64 %loop73.i, 84
  %v83 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v82
  %v84 = load <8 x double>, ptr %v83, align 64
  %v85 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v84)
  %v86 = fcmp ole <8 x double> %v85, %v81
  %v87 = select <8 x i1> %v86, <8 x double> %loop73.carried, <8 x double> splat (double 0x3FF0000000000000)
  %loop73.next = add nuw nsw i64 %loop73.i, 1
  %v88 = icmp ult i64 %loop73.next, 2
  br i1 %v88, label %loop73, label %loop73.end
loop73.end:
  %v89 = fcmp ogt <8 x double> %v87, splat (double 0x0000000000000000)
  %v90 = and <8 x i1> %v2, %v89
  %v91 = bitcast <8 x i1> %v90 to i8
  %v92 = zext i8 %v91 to i64
  ret i64 %v92
}

define i64 @uq_stiff(ptr noalias %lanes, ptr noalias readonly %settings) #1 {
entry:
  ; length of the attempt: proposed, stretched or halved towards the end of the segment
  %v1 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = getelementptr inbounds <8 x double>, ptr %lanes, i64 1
  %v4 = load <8 x double>, ptr %v3, align 64
  %v5 = getelementptr inbounds <8 x double>, ptr %lanes, i64 2
  %v6 = load <8 x double>, ptr %v5, align 64
  %v7 = fsub <8 x double> %v6, %v2
  %v8 = fmul <8 x double> %v4, splat (double 0x3FF028F5C28F5C29)
  %v9 = fcmp oge <8 x double> %v8, %v7
  %v10 = fadd <8 x double> %v4, %v4
  %v11 = fcmp oge <8 x double> %v10, %v7
  %v12 = fmul <8 x double> %v7, splat (double 0x3FE0000000000000)
  %v13 = select <8 x i1> %v11, <8 x double> %v12, <8 x double> %v4
  %v14 = fadd <8 x double> %v2, %v13
  %v15 = select <8 x i1> %v9, <8 x double> %v6, <8 x double> %v14
  %v16 = fsub <8 x double> %v15, %v2
  ; Jacobian and factors
  %v17 = fdiv <8 x double> splat (double 0x3FF0000000000000), %v16
  %v18 = fmul <8 x double> splat (double 0x4012DF9C95477E4F), %v17
  call void @uq_linear(ptr %lanes, ptr %settings, <8 x double> %v2)
  %v19 = call i64 @uq_factor(ptr %lanes, <8 x double> %v18)
  %v20 = icmp ne i64 %v19, 0
  ; stages
  br label %loop21
loop21:
  %loop21.i = phi i64 [ 0, %entry ], [ %loop21.next, %loop21 ]
  %loop21.carried = phi i1 [ false, %entry ], [ %loop21.carried, %loop21 ]
  %v22 = fmul <8 x double> splat (double 0x3FCB20C5235B5100), %v16
  %v23 = add i64 %loop21.i, 76
  %v24 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v23
  %v25 = load <8 x double>, ptr %v24, align 64
  %v26 = fmul <8 x double> %v22, %v25
  %v27 = add i64 %loop21.i, 74
  %v28 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v27
  store <8 x double> %v26, ptr %v28, align 64
  %loop21.next = add nuw nsw i64 %loop21.i, 1
  %v29 = icmp ult i64 %loop21.next, 2
  br i1 %v29, label %loop21, label %loop21.end
loop21.end:
  %v30 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  %v31 = getelementptr inbounds <8 x double>, ptr %lanes, i64 74
  %v32 = getelementptr inbounds <8 x double>, ptr %lanes, i64 92
  call void @uq_lines(ptr %lanes, ptr %v30, ptr %v31, ptr %v32)
  br i1 %v20, label %refine0, label %stage0
refine0:
  %v33 = call i64 @uq_refine(ptr %lanes, <8 x double> %v18, ptr %v30, ptr %v31, ptr %v32, i64 %v19)
  br label %stage0
stage0:
  %v34 = phi i64 [ 0, %loop21.end ], [ %v33, %refine0 ]
  %v35 = or i64 0, %v34
  br label %loop36
loop36:
  %loop36.i = phi i64 [ 0, %stage0 ], [ %loop36.next, %loop36 ]
  %loop36.carried = phi i1 [ false, %stage0 ], [ %loop36.carried, %loop36 ]
  %v37 = add i64 %loop36.i, 22
  %v38 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v37
  %v39 = load <8 x double>, ptr %v38, align 64
  %v40 = add i64 %loop36.i, 92
  %v41 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v40
  %v42 = load <8 x double>, ptr %v41, align 64
  %v43 = fmul <8 x double> splat (double 0x4008000000000000), %v42
  %v44 = fadd <8 x double> %v39, %v43
  %v45 = add i64 %loop36.i, 70
  %v46 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v45
  store <8 x double> %v44, ptr %v46, align 64
  %v47 = add i64 %loop36.i, 92
  %v48 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v47
  %v49 = load <8 x double>, ptr %v48, align 64
  %v50 = fmul <8 x double> splat (double 0xC02C4F6ADFEB3D76), %v49
  %v51 = fmul <8 x double> %v17, %v50
  %v52 = fmul <8 x double> splat (double 0xBFDB20C5235B5100), %v16
  %v53 = add i64 %loop36.i, 76
  %v54 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v53
  %v55 = load <8 x double>, ptr %v54, align 64
  %v56 = fmul <8 x double> %v52, %v55
  %v57 = fadd <8 x double> %v51, %v56
  %v58 = add i64 %loop36.i, 74
  %v59 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v58
  store <8 x double> %v57, ptr %v59, align 64
  %loop36.next = add nuw nsw i64 %loop36.i, 1
  %v60 = icmp ult i64 %loop36.next, 2
  br i1 %v60, label %loop36, label %loop36.end
loop36.end:
  %v61 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FE45893DA847CC0), <8 x double> %v16, <8 x double> %v2)
  %v62 = getelementptr inbounds <8 x double>, ptr %lanes, i64 70
  %v63 = getelementptr inbounds <8 x double>, ptr %lanes, i64 72
  call void @uq_system(ptr %lanes, <8 x double> %v61, ptr %v62, ptr %v63)
  %v64 = getelementptr inbounds <8 x double>, ptr %lanes, i64 72
  %v65 = getelementptr inbounds <8 x double>, ptr %lanes, i64 74
  %v66 = getelementptr inbounds <8 x double>, ptr %lanes, i64 94
  call void @uq_lines(ptr %lanes, ptr %v64, ptr %v65, ptr %v66)
  br i1 %v20, label %refine1, label %stage1
refine1:
  %v67 = call i64 @uq_refine(ptr %lanes, <8 x double> %v18, ptr %v64, ptr %v65, ptr %v66, i64 %v19)
  br label %stage1
stage1:
  %v68 = phi i64 [ 0, %loop36.end ], [ %v67, %refine1 ]
  %v69 = or i64 %v35, %v68
  br label %loop70
loop70:
  %loop70.i = phi i64 [ 0, %stage1 ], [ %loop70.next, %loop70 ]
  %loop70.carried = phi i1 [ false, %stage1 ], [ %loop70.carried, %loop70 ]
  %v71 = add i64 %loop70.i, 22
  %v72 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v71
  %v73 = load <8 x double>, ptr %v72, align 64
  %v74 = add i64 %loop70.i, 92
  %v75 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v74
  %v76 = load <8 x double>, ptr %v75, align 64
  %v77 = fmul <8 x double> splat (double 0x4006CB8F47D3638A), %v76
  %v78 = add i64 %loop70.i, 94
  %v79 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v78
  %v80 = load <8 x double>, ptr %v79, align 64
  %v81 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FDD56CAFF9BD456), <8 x double> %v80, <8 x double> %v77)
  %v82 = fadd <8 x double> %v73, %v81
  %v83 = add i64 %loop70.i, 70
  %v84 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v83
  store <8 x double> %v82, ptr %v84, align 64
  %v85 = add i64 %loop70.i, 92
  %v86 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v85
  %v87 = load <8 x double>, ptr %v86, align 64
  %v88 = fmul <8 x double> splat (double 0xC031F913EE199B27), %v87
  %v89 = add i64 %loop70.i, 94
  %v90 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v89
  %v91 = load <8 x double>, ptr %v90, align 64
  %v92 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC006E0A6E0E46E21), <8 x double> %v91, <8 x double> %v88)
  %v93 = fmul <8 x double> %v17, %v92
  %v94 = fmul <8 x double> splat (double 0xBFD5A95F82688FC8), %v16
  %v95 = add i64 %loop70.i, 76
  %v96 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v95
  %v97 = load <8 x double>, ptr %v96, align 64
  %v98 = fmul <8 x double> %v94, %v97
  %v99 = fadd <8 x double> %v93, %v98
  %v100 = add i64 %loop70.i, 74
  %v101 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v100
  store <8 x double> %v99, ptr %v101, align 64
  %loop70.next = add nuw nsw i64 %loop70.i, 1
  %v102 = icmp ult i64 %loop70.next, 2
  br i1 %v102, label %loop70, label %loop70.end
loop70.end:
  %v103 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FDA368E5BC42BD6), <8 x double> %v16, <8 x double> %v2)
  %v104 = getelementptr inbounds <8 x double>, ptr %lanes, i64 70
  %v105 = getelementptr inbounds <8 x double>, ptr %lanes, i64 72
  call void @uq_system(ptr %lanes, <8 x double> %v103, ptr %v104, ptr %v105)
  %v106 = getelementptr inbounds <8 x double>, ptr %lanes, i64 72
  %v107 = getelementptr inbounds <8 x double>, ptr %lanes, i64 74
  %v108 = getelementptr inbounds <8 x double>, ptr %lanes, i64 96
  call void @uq_lines(ptr %lanes, ptr %v106, ptr %v107, ptr %v108)
  br i1 %v20, label %refine2, label %stage2
refine2:
  %v109 = call i64 @uq_refine(ptr %lanes, <8 x double> %v18, ptr %v106, ptr %v107, ptr %v108, i64 %v19)
  br label %stage2
stage2:
  %v110 = phi i64 [ 0, %loop70.end ], [ %v109, %refine2 ]
  %v111 = or i64 %v69, %v110
  br label %loop112
loop112:
  %loop112.i = phi i64 [ 0, %stage2 ], [ %loop112.next, %loop112 ]
  %loop112.carried = phi i1 [ false, %stage2 ], [ %loop112.carried, %loop112 ]
  %v113 = add i64 %loop112.i, 22
  %v114 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v113
  %v115 = load <8 x double>, ptr %v114, align 64
  %v116 = add i64 %loop112.i, 92
  %v117 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v116
  %v118 = load <8 x double>, ptr %v117, align 64
  %v119 = fmul <8 x double> splat (double 0xC01BD0ECD98453AA), %v118
  %v120 = add i64 %loop112.i, 94
  %v121 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v120
  %v122 = load <8 x double>, ptr %v121, align 64
  %v123 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4003EB33E346B1F4), <8 x double> %v122, <8 x double> %v119)
  %v124 = add i64 %loop112.i, 96
  %v125 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v124
  %v126 = load <8 x double>, ptr %v125, align 64
  %v127 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC024B7CE562CABD9), <8 x double> %v126, <8 x double> %v123)
  %v128 = fadd <8 x double> %v115, %v127
  %v129 = add i64 %loop112.i, 70
  %v130 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v129
  store <8 x double> %v128, ptr %v130, align 64
  %v131 = add i64 %loop112.i, 92
  %v132 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v131
  %v133 = load <8 x double>, ptr %v132, align 64
  %v134 = fmul <8 x double> splat (double 0x406263E359C00625), %v133
  %v135 = add i64 %loop112.i, 94
  %v136 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v135
  %v137 = load <8 x double>, ptr %v136, align 64
  %v138 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFF6986DBC5B31FC), <8 x double> %v137, <8 x double> %v134)
  %v139 = add i64 %loop112.i, 96
  %v140 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v139
  %v141 = load <8 x double>, ptr %v140, align 64
  %v142 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4051EC1F2BB7CDDB), <8 x double> %v141, <8 x double> %v138)
  %v143 = fmul <8 x double> %v17, %v142
  %v144 = fmul <8 x double> splat (double 0x3FFCDFD3BC9C89DE), %v16
  %v145 = add i64 %loop112.i, 76
  %v146 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v145
  %v147 = load <8 x double>, ptr %v146, align 64
  %v148 = fmul <8 x double> %v144, %v147
  %v149 = fadd <8 x double> %v143, %v148
  %v150 = add i64 %loop112.i, 74
  %v151 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v150
  store <8 x double> %v149, ptr %v151, align 64
  %loop112.next = add nuw nsw i64 %loop112.i, 1
  %v152 = icmp ult i64 %loop112.next, 2
  br i1 %v152, label %loop112, label %loop112.end
loop112.end:
  %v153 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FEF43041D1BEE80), <8 x double> %v16, <8 x double> %v2)
  %v154 = getelementptr inbounds <8 x double>, ptr %lanes, i64 70
  %v155 = getelementptr inbounds <8 x double>, ptr %lanes, i64 72
  call void @uq_system(ptr %lanes, <8 x double> %v153, ptr %v154, ptr %v155)
  %v156 = getelementptr inbounds <8 x double>, ptr %lanes, i64 72
  %v157 = getelementptr inbounds <8 x double>, ptr %lanes, i64 74
  %v158 = getelementptr inbounds <8 x double>, ptr %lanes, i64 98
  call void @uq_lines(ptr %lanes, ptr %v156, ptr %v157, ptr %v158)
  br i1 %v20, label %refine3, label %stage3
refine3:
  %v159 = call i64 @uq_refine(ptr %lanes, <8 x double> %v18, ptr %v156, ptr %v157, ptr %v158, i64 %v19)
  br label %stage3
stage3:
  %v160 = phi i64 [ 0, %loop112.end ], [ %v159, %refine3 ]
  %v161 = or i64 %v111, %v160
  br label %loop162
loop162:
  %loop162.i = phi i64 [ 0, %stage3 ], [ %loop162.next, %loop162 ]
  %loop162.carried = phi i1 [ false, %stage3 ], [ %loop162.carried, %loop162 ]
  %v163 = add i64 %loop162.i, 22
  %v164 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v163
  %v165 = load <8 x double>, ptr %v164, align 64
  %v166 = add i64 %loop162.i, 92
  %v167 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v166
  %v168 = load <8 x double>, ptr %v167, align 64
  %v169 = fmul <8 x double> splat (double 0x40066C8A8B60EC98), %v168
  %v170 = add i64 %loop162.i, 94
  %v171 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v170
  %v172 = load <8 x double>, ptr %v171, align 64
  %v173 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FE03B5CF4E7153A), <8 x double> %v172, <8 x double> %v169)
  %v174 = add i64 %loop162.i, 96
  %v175 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v174
  %v176 = load <8 x double>, ptr %v175, align 64
  %v177 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD98673865409E3), <8 x double> %v176, <8 x double> %v173)
  %v178 = add i64 %loop162.i, 98
  %v179 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v178
  %v180 = load <8 x double>, ptr %v179, align 64
  %v181 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFA82C278F0EBFDB), <8 x double> %v180, <8 x double> %v177)
  %v182 = fadd <8 x double> %v165, %v181
  %v183 = add i64 %loop162.i, 70
  %v184 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v183
  store <8 x double> %v182, ptr %v184, align 64
  %v185 = add i64 %loop162.i, 92
  %v186 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v185
  %v187 = load <8 x double>, ptr %v186, align 64
  %v188 = fmul <8 x double> splat (double 0x4064ADECEA284DC8), %v187
  %v189 = add i64 %loop162.i, 94
  %v190 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v189
  %v191 = load <8 x double>, ptr %v190, align 64
  %v192 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFDD64E1C78C5BDB), <8 x double> %v191, <8 x double> %v188)
  %v193 = add i64 %loop162.i, 96
  %v194 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v193
  %v195 = load <8 x double>, ptr %v194, align 64
  %v196 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40457466AC9BF2FB), <8 x double> %v195, <8 x double> %v192)
  %v197 = add i64 %loop162.i, 98
  %v198 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v197
  %v199 = load <8 x double>, ptr %v198, align 64
  %v200 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC017D9130C115FDA), <8 x double> %v199, <8 x double> %v196)
  %v201 = fmul <8 x double> %v17, %v200
  %v202 = fmul <8 x double> splat (double 0x40029B4A7917E9FB), %v16
  %v203 = add i64 %loop162.i, 76
  %v204 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v203
  %v205 = load <8 x double>, ptr %v204, align 64
  %v206 = fmul <8 x double> %v202, %v205
  %v207 = fadd <8 x double> %v201, %v206
  %v208 = add i64 %loop162.i, 74
  %v209 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v208
  store <8 x double> %v207, ptr %v209, align 64
  %loop162.next = add nuw nsw i64 %loop162.i, 1
  %v210 = icmp ult i64 %loop162.next, 2
  br i1 %v210, label %loop162, label %loop162.end
loop162.end:
  %v211 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FDB721ED760A874), <8 x double> %v16, <8 x double> %v2)
  %v212 = getelementptr inbounds <8 x double>, ptr %lanes, i64 70
  %v213 = getelementptr inbounds <8 x double>, ptr %lanes, i64 72
  call void @uq_system(ptr %lanes, <8 x double> %v211, ptr %v212, ptr %v213)
  %v214 = getelementptr inbounds <8 x double>, ptr %lanes, i64 72
  %v215 = getelementptr inbounds <8 x double>, ptr %lanes, i64 74
  %v216 = getelementptr inbounds <8 x double>, ptr %lanes, i64 100
  call void @uq_lines(ptr %lanes, ptr %v214, ptr %v215, ptr %v216)
  br i1 %v20, label %refine4, label %stage4
refine4:
  %v217 = call i64 @uq_refine(ptr %lanes, <8 x double> %v18, ptr %v214, ptr %v215, ptr %v216, i64 %v19)
  br label %stage4
stage4:
  %v218 = phi i64 [ 0, %loop162.end ], [ %v217, %refine4 ]
  %v219 = or i64 %v161, %v218
  br label %loop220
loop220:
  %loop220.i = phi i64 [ 0, %stage4 ], [ %loop220.next, %loop220 ]
  %loop220.carried = phi i1 [ false, %stage4 ], [ %loop220.carried, %loop220 ]
  %v221 = add i64 %loop220.i, 22
  %v222 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v221
  %v223 = load <8 x double>, ptr %v222, align 64
  %v224 = add i64 %loop220.i, 92
  %v225 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v224
  %v226 = load <8 x double>, ptr %v225, align 64
  %v227 = fmul <8 x double> splat (double 0xC01E02EA2A9FB97F), %v226
  %v228 = add i64 %loop220.i, 94
  %v229 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v228
  %v230 = load <8 x double>, ptr %v229, align 64
  %v231 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40047EA9310A8838), <8 x double> %v230, <8 x double> %v227)
  %v232 = add i64 %loop220.i, 96
  %v233 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v232
  %v234 = load <8 x double>, ptr %v233, align 64
  %v235 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC027414CE0B92B43), <8 x double> %v234, <8 x double> %v231)
  %v236 = add i64 %loop220.i, 98
  %v237 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v236
  %v238 = load <8 x double>, ptr %v237, align 64
  %v239 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFC7624F4E303929), <8 x double> %v238, <8 x double> %v235)
  %v240 = add i64 %loop220.i, 100
  %v241 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v240
  %v242 = load <8 x double>, ptr %v241, align 64
  %v243 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F9EEC4504B32A44), <8 x double> %v242, <8 x double> %v239)
  %v244 = fadd <8 x double> %v223, %v243
  %v245 = add i64 %loop220.i, 70
  %v246 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v245
  store <8 x double> %v244, ptr %v246, align 64
  %v247 = add i64 %loop220.i, 92
  %v248 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v247
  %v249 = load <8 x double>, ptr %v248, align 64
  %v250 = fmul <8 x double> splat (double 0x4038DAD8684A99FC), %v249
  %v251 = add i64 %loop220.i, 94
  %v252 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v251
  %v253 = load <8 x double>, ptr %v252, align 64
  %v254 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC00801E3C2BC52CF), <8 x double> %v253, <8 x double> %v250)
  %v255 = add i64 %loop220.i, 96
  %v256 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v255
  %v257 = load <8 x double>, ptr %v256, align 64
  %v258 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4047BF1E42E59BDC), <8 x double> %v257, <8 x double> %v254)
  %v259 = add i64 %loop220.i, 98
  %v260 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v259
  %v261 = load <8 x double>, ptr %v260, align 64
  %v262 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4016535FB5166D38), <8 x double> %v261, <8 x double> %v258)
  %v263 = add i64 %loop220.i, 100
  %v264 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v263
  %v265 = load <8 x double>, ptr %v264, align 64
  %v266 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFE5277A8EEAD1BC), <8 x double> %v265, <8 x double> %v262)
  %v267 = fmul <8 x double> %v17, %v266
  %v268 = add i64 %loop220.i, 74
  %v269 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v268
  store <8 x double> %v267, ptr %v269, align 64
  %loop220.next = add nuw nsw i64 %loop220.i, 1
  %v270 = icmp ult i64 %loop220.next, 2
  br i1 %v270, label %loop220, label %loop220.end
loop220.end:
  %v271 = getelementptr inbounds <8 x double>, ptr %lanes, i64 70
  %v272 = getelementptr inbounds <8 x double>, ptr %lanes, i64 72
  call void @uq_system(ptr %lanes, <8 x double> %v15, ptr %v271, ptr %v272)
  %v273 = getelementptr inbounds <8 x double>, ptr %lanes, i64 72
  %v274 = getelementptr inbounds <8 x double>, ptr %lanes, i64 74
  %v275 = getelementptr inbounds <8 x double>, ptr %lanes, i64 102
  call void @uq_lines(ptr %lanes, ptr %v273, ptr %v274, ptr %v275)
  br i1 %v20, label %refine5, label %stage5
refine5:
  %v276 = call i64 @uq_refine(ptr %lanes, <8 x double> %v18, ptr %v273, ptr %v274, ptr %v275, i64 %v19)
  br label %stage5
stage5:
  %v277 = phi i64 [ 0, %loop220.end ], [ %v276, %refine5 ]
  %v278 = or i64 %v219, %v277
  br label %loop279
loop279:
  %loop279.i = phi i64 [ 0, %stage5 ], [ %loop279.next, %loop279 ]
  %loop279.carried = phi i1 [ false, %stage5 ], [ %loop279.carried, %loop279 ]
  %v280 = add i64 %loop279.i, 70
  %v281 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v280
  %v282 = load <8 x double>, ptr %v281, align 64
  %v283 = add i64 %loop279.i, 102
  %v284 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v283
  %v285 = load <8 x double>, ptr %v284, align 64
  %v286 = fadd <8 x double> %v282, %v285
  %v287 = add i64 %loop279.i, 70
  %v288 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v287
  store <8 x double> %v286, ptr %v288, align 64
  %v289 = add i64 %loop279.i, 92
  %v290 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v289
  %v291 = load <8 x double>, ptr %v290, align 64
  %v292 = fmul <8 x double> splat (double 0x403EE9A8D0448952), %v291
  %v293 = add i64 %loop279.i, 94
  %v294 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v293
  %v295 = load <8 x double>, ptr %v294, align 64
  %v296 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC008F772BFBADFDD), <8 x double> %v295, <8 x double> %v292)
  %v297 = add i64 %loop279.i, 96
  %v298 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v297
  %v299 = load <8 x double>, ptr %v298, align 64
  %v300 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4053732BC4EB1827), <8 x double> %v299, <8 x double> %v296)
  %v301 = add i64 %loop279.i, 98
  %v302 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v301
  %v303 = load <8 x double>, ptr %v302, align 64
  %v304 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x404124AABB056E92), <8 x double> %v303, <8 x double> %v300)
  %v305 = add i64 %loop279.i, 100
  %v306 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v305
  %v307 = load <8 x double>, ptr %v306, align 64
  %v308 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC03318EAB12B383F), <8 x double> %v307, <8 x double> %v304)
  %v309 = add i64 %loop279.i, 102
  %v310 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v309
  %v311 = load <8 x double>, ptr %v310, align 64
  %v312 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC03C1683717071E4), <8 x double> %v311, <8 x double> %v308)
  %v313 = fmul <8 x double> %v17, %v312
  %v314 = add i64 %loop279.i, 74
  %v315 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v314
  store <8 x double> %v313, ptr %v315, align 64
  %loop279.next = add nuw nsw i64 %loop279.i, 1
  %v316 = icmp ult i64 %loop279.next, 2
  br i1 %v316, label %loop279, label %loop279.end
loop279.end:
  %v317 = getelementptr inbounds <8 x double>, ptr %lanes, i64 70
  %v318 = getelementptr inbounds <8 x double>, ptr %lanes, i64 72
  call void @uq_system(ptr %lanes, <8 x double> %v15, ptr %v317, ptr %v318)
  %v319 = getelementptr inbounds <8 x double>, ptr %lanes, i64 72
  %v320 = getelementptr inbounds <8 x double>, ptr %lanes, i64 74
  %v321 = getelementptr inbounds <8 x double>, ptr %lanes, i64 104
  call void @uq_lines(ptr %lanes, ptr %v319, ptr %v320, ptr %v321)
  br i1 %v20, label %refine6, label %stage6
refine6:
  %v322 = call i64 @uq_refine(ptr %lanes, <8 x double> %v18, ptr %v319, ptr %v320, ptr %v321, i64 %v19)
  br label %stage6
stage6:
  %v323 = phi i64 [ 0, %loop279.end ], [ %v322, %refine6 ]
  %v324 = or i64 %v278, %v323
  br label %loop325
loop325:
  %loop325.i = phi i64 [ 0, %stage6 ], [ %loop325.next, %loop325 ]
  %loop325.carried = phi i1 [ false, %stage6 ], [ %loop325.carried, %loop325 ]
  %v326 = add i64 %loop325.i, 70
  %v327 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v326
  %v328 = load <8 x double>, ptr %v327, align 64
  %v329 = add i64 %loop325.i, 104
  %v330 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v329
  %v331 = load <8 x double>, ptr %v330, align 64
  %v332 = fadd <8 x double> %v328, %v331
  %v333 = add i64 %loop325.i, 70
  %v334 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v333
  store <8 x double> %v332, ptr %v334, align 64
  %v335 = add i64 %loop325.i, 92
  %v336 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v335
  %v337 = load <8 x double>, ptr %v336, align 64
  %v338 = fmul <8 x double> splat (double 0x4042E6C13531E5AA), %v337
  %v339 = add i64 %loop325.i, 94
  %v340 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v339
  %v341 = load <8 x double>, ptr %v340, align 64
  %v342 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC00A0EBD3FF4F3C6), <8 x double> %v341, <8 x double> %v338)
  %v343 = add i64 %loop325.i, 96
  %v344 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v343
  %v345 = load <8 x double>, ptr %v344, align 64
  %v346 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x405C113A626194E9), <8 x double> %v345, <8 x double> %v342)
  %v347 = add i64 %loop325.i, 98
  %v348 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v347
  %v349 = load <8 x double>, ptr %v348, align 64
  %v350 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4050BBD280F08885), <8 x double> %v349, <8 x double> %v346)
  %v351 = add i64 %loop325.i, 100
  %v352 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v351
  %v353 = load <8 x double>, ptr %v352, align 64
  %v354 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC0440878E4AFB35F), <8 x double> %v353, <8 x double> %v350)
  %v355 = add i64 %loop325.i, 102
  %v356 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v355
  %v357 = load <8 x double>, ptr %v356, align 64
  %v358 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC04B557A8E796552), <8 x double> %v357, <8 x double> %v354)
  %v359 = add i64 %loop325.i, 104
  %v360 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v359
  %v361 = load <8 x double>, ptr %v360, align 64
  %v362 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC022FA2BF1E5F7A9), <8 x double> %v361, <8 x double> %v358)
  %v363 = fmul <8 x double> %v17, %v362
  %v364 = add i64 %loop325.i, 74
  %v365 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v364
  store <8 x double> %v363, ptr %v365, align 64
  %loop325.next = add nuw nsw i64 %loop325.i, 1
  %v366 = icmp ult i64 %loop325.next, 2
  br i1 %v366, label %loop325, label %loop325.end
loop325.end:
  %v367 = getelementptr inbounds <8 x double>, ptr %lanes, i64 70
  %v368 = getelementptr inbounds <8 x double>, ptr %lanes, i64 72
  call void @uq_system(ptr %lanes, <8 x double> %v15, ptr %v367, ptr %v368)
  %v369 = getelementptr inbounds <8 x double>, ptr %lanes, i64 72
  %v370 = getelementptr inbounds <8 x double>, ptr %lanes, i64 74
  %v371 = getelementptr inbounds <8 x double>, ptr %lanes, i64 106
  call void @uq_lines(ptr %lanes, ptr %v369, ptr %v370, ptr %v371)
  br i1 %v20, label %refine7, label %stage7
refine7:
  %v372 = call i64 @uq_refine(ptr %lanes, <8 x double> %v18, ptr %v369, ptr %v370, ptr %v371, i64 %v19)
  br label %stage7
stage7:
  %v373 = phi i64 [ 0, %loop325.end ], [ %v372, %refine7 ]
  %v374 = or i64 %v324, %v373
  br label %loop375
loop375:
  %loop375.i = phi i64 [ 0, %stage7 ], [ %loop375.next, %loop375 ]
  %loop375.carried = phi i1 [ false, %stage7 ], [ %loop375.carried, %loop375 ]
  %v376 = add i64 %loop375.i, 70
  %v377 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v376
  %v378 = load <8 x double>, ptr %v377, align 64
  %v379 = add i64 %loop375.i, 106
  %v380 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v379
  %v381 = load <8 x double>, ptr %v380, align 64
  %v382 = fadd <8 x double> %v378, %v381
  %v383 = add i64 %loop375.i, 70
  %v384 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v383
  store <8 x double> %v382, ptr %v384, align 64
  %loop375.next = add nuw nsw i64 %loop375.i, 1
  %v385 = icmp ult i64 %loop375.next, 2
  br i1 %v385, label %loop375, label %loop375.end
loop375.end:
  %v386 = getelementptr inbounds <8 x double>, ptr %lanes, i64 70
  %v387 = getelementptr inbounds <8 x double>, ptr %lanes, i64 72
  call void @uq_system(ptr %lanes, <8 x double> %v15, ptr %v386, ptr %v387)
  ; error in units of the tolerance, squared, averaged over the states
  %v388 = getelementptr inbounds <8 x double>, ptr %settings, i64 0
  %v389 = load <8 x double>, ptr %v388, align 64
  br label %loop390
loop390:
  %loop390.i = phi i64 [ 0, %loop375.end ], [ %loop390.next, %loop390 ]
  %loop390.carried = phi <8 x double> [ splat (double 0x0000000000000000), %loop375.end ], [ %v409, %loop390 ]
  %v391 = add i64 %loop390.i, 22
  %v392 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v391
  %v393 = load <8 x double>, ptr %v392, align 64
  %v394 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v393)
  %v395 = add i64 %loop390.i, 70
  %v396 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v395
  %v397 = load <8 x double>, ptr %v396, align 64
  %v398 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v397)
  %v399 = fcmp ogt <8 x double> %v394, %v398
  %v400 = select <8 x i1> %v399, <8 x double> %v394, <8 x double> %v398
  %v401 = add i64 %loop390.i, 106
  %v402 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v401
  %v403 = load <8 x double>, ptr %v402, align 64
  %v404 = add i64 %loop390.i, 9
  %v405 = getelementptr inbounds <8 x double>, ptr %settings, i64 %v404
  %v406 = load <8 x double>, ptr %v405, align 64
  %v407 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v389, <8 x double> %v400, <8 x double> %v406)
  %v408 = fdiv <8 x double> %v403, %v407
  %v409 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v408, <8 x double> %v408, <8 x double> %loop390.carried)
  %loop390.next = add nuw nsw i64 %loop390.i, 1
  %v410 = icmp ult i64 %loop390.next, 2
  br i1 %v410, label %loop390, label %loop390.end
loop390.end:
  br label %loop411
loop411:
  %loop411.i = phi i64 [ 0, %loop390.end ], [ %loop411.next, %loop411 ]
  %loop411.carried = phi <8 x double> [ splat (double 0x0000000000000000), %loop390.end ], [ %v419, %loop411 ]
  %v412 = add i64 %loop411.i, 70
  %v413 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v412
  %v414 = load <8 x double>, ptr %v413, align 64
  %v415 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v414, <8 x double> splat (double 0x0000000000000000), <8 x double> %loop411.carried)
  %v416 = add i64 %loop411.i, 72
  %v417 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v416
  %v418 = load <8 x double>, ptr %v417, align 64
  %v419 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v418, <8 x double> splat (double 0x0000000000000000), <8 x double> %v415)
  %loop411.next = add nuw nsw i64 %loop411.i, 1
  %v420 = icmp ult i64 %loop411.next, 2
  br i1 %v420, label %loop411, label %loop411.end
loop411.end:
  %v421 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v409, <8 x double> splat (double 0x3FE0000000000000), <8 x double> %v419)
  %v422 = trunc i64 %v374 to i8
  %v423 = bitcast i8 %v422 to <8 x i1>
  %v424 = select <8 x i1> %v423, <8 x double> splat (double 0x4415AF1D78B58C40), <8 x double> %v421
  ; accepted or refused, and the next length
  %v425 = getelementptr inbounds <8 x double>, ptr %lanes, i64 10
  %v426 = load <8 x double>, ptr %v425, align 64
  %v427 = fcmp ogt <8 x double> %v426, splat (double 0x0000000000000000)
  %v428 = fcmp ole <8 x double> %v424, splat (double 0x3FF0000000000000)
  %v429 = and <8 x i1> %v427, %v428
  %v430 = fcmp olt <8 x double> %v424, splat (double 0x46293E5939A08CEA)
  %v431 = select <8 x i1> %v430, <8 x double> %v424, <8 x double> splat (double 0x46293E5939A08CEA)
  %v432 = fcmp ogt <8 x double> %v431, splat (double 0x39B4484BFEEBC2A0)
  %v433 = select <8 x i1> %v432, <8 x double> %v431, <8 x double> splat (double 0x39B4484BFEEBC2A0)
  %v434 = bitcast <8 x double> %v433 to <8 x i64>
  %v435 = lshr <8 x i64> %v434, splat (i64 52)
  %v436 = or <8 x i64> %v435, splat (i64 4841369599423283200)
  %v437 = bitcast <8 x i64> %v436 to <8 x double>
  %v438 = fsub <8 x double> %v437, splat (double 0x43300000000003FF)
  %v439 = and <8 x i64> %v434, splat (i64 4503599627370495)
  %v440 = or <8 x i64> %v439, splat (i64 4607182418800017408)
  %v441 = bitcast <8 x i64> %v440 to <8 x double>
  %v442 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA604C059210386), <8 x double> %v441, <8 x double> splat (double 0xBFD9C2C7904CE9BE))
  %v443 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v442, <8 x double> %v441, <8 x double> splat (double 0x3FF96E7C9A8551E4))
  %v444 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v443, <8 x double> %v441, <8 x double> splat (double 0xC00BEB4578B01506))
  %v445 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v444, <8 x double> %v441, <8 x double> splat (double 0x401431010187BF7D))
  %v446 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v445, <8 x double> %v441, <8 x double> splat (double 0xC0064DAC40654ADD))
  %v447 = fadd <8 x double> %v438, %v446
  %v448 = getelementptr inbounds <8 x double>, ptr %lanes, i64 6
  %v449 = load <8 x double>, ptr %v448, align 64
  %v450 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v449, <8 x double> splat (double 0x3F947AE147AE147B), <8 x double> splat (double 0xBFC374D65D9E608D))
  %v451 = select <8 x i1> %v429, <8 x double> %v450, <8 x double> splat (double 0xBFC374D65D9E608D)
  %v452 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v447, <8 x double> splat (double 0xBFB5C28F5C28F5C3), <8 x double> %v451)
  %v453 = getelementptr inbounds <8 x double>, ptr %lanes, i64 7
  %v454 = load <8 x double>, ptr %v453, align 64
  %v455 = fcmp ogt <8 x double> %v454, splat (double 0x0000000000000000)
  %v456 = xor <8 x i1> %v429, splat (i1 true)
  %v457 = or <8 x i1> %v455, %v456
  %v458 = select <8 x i1> %v457, <8 x double> splat (double 0x0000000000000000), <8 x double> splat (double 0x4008000000000000)
  %v459 = fcmp olt <8 x double> %v452, %v458
  %v460 = select <8 x i1> %v459, <8 x double> %v452, <8 x double> %v458
  %v461 = fcmp ogt <8 x double> %v460, splat (double 0xC002934F0979A371)
  %v462 = select <8 x i1> %v461, <8 x double> %v460, <8 x double> splat (double 0xC002934F0979A371)
  %v463 = fadd <8 x double> %v462, splat (double 0x4338000000000000)
  %v464 = fsub <8 x double> %v463, splat (double 0x4338000000000000)
  %v465 = fsub <8 x double> %v462, %v464
  %v466 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F83CBFA3EF5DF15), <8 x double> %v465, <8 x double> splat (double 0x3FACA1CEF240FA9C))
  %v467 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v466, <8 x double> %v465, <8 x double> splat (double 0x3FCEBFA4C61D8623))
  %v468 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v467, <8 x double> %v465, <8 x double> splat (double 0x3FE62E0C17657753))
  %v469 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v468, <8 x double> %v465, <8 x double> splat (double 0x3FF0000000000000))
  %v470 = bitcast <8 x double> %v463 to <8 x i64>
  %v471 = shl <8 x i64> %v470, splat (i64 52)
  %v472 = bitcast <8 x double> %v469 to <8 x i64>
  %v473 = add <8 x i64> %v472, %v471
  %v474 = bitcast <8 x i64> %v473 to <8 x double>
  %v475 = fmul <8 x double> %v16, %v474
  %v476 = fcmp oge <8 x double> %v474, splat (double 0x3FF0000000000000)
  %v477 = fcmp ogt <8 x double> %v4, %v475
  %v478 = and <8 x i1> %v476, %v477
  %v479 = and <8 x i1> %v429, %v478
  %v480 = select <8 x i1> %v479, <8 x double> %v4, <8 x double> %v475
  %v481 = fcmp ogt <8 x double> %v447, splat (double 0xC03A934F0979A371)
  %v482 = select <8 x i1> %v481, <8 x double> %v447, <8 x double> splat (double 0xC03A934F0979A371)
  ; what the lane is now
  %v483 = fcmp ogt <8 x double> %v426, splat (double 0x0000000000000000)
  %v484 = xor <8 x i1> %v429, splat (i1 true)
  %v485 = and <8 x i1> %v483, %v484
  %v486 = select <8 x i1> %v429, <8 x double> %v15, <8 x double> %v2
  %v487 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  store <8 x double> %v486, ptr %v487, align 64
  %v488 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  %v489 = load <8 x double>, ptr %v488, align 64
  %v490 = select <8 x i1> %v429, <8 x double> %v2, <8 x double> %v489
  %v491 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  store <8 x double> %v490, ptr %v491, align 64
  %v492 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  %v493 = load <8 x double>, ptr %v492, align 64
  %v494 = select <8 x i1> %v429, <8 x double> %v16, <8 x double> %v493
  %v495 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  store <8 x double> %v494, ptr %v495, align 64
  %v496 = select <8 x i1> %v429, <8 x double> %v482, <8 x double> %v449
  %v497 = getelementptr inbounds <8 x double>, ptr %lanes, i64 6
  store <8 x double> %v496, ptr %v497, align 64
  %v498 = getelementptr inbounds <8 x double>, ptr %lanes, i64 1
  store <8 x double> %v480, ptr %v498, align 64
  %v499 = select <8 x i1> %v485, <8 x double> splat (double 0x3FF0000000000000), <8 x double> splat (double 0x0000000000000000)
  %v500 = getelementptr inbounds <8 x double>, ptr %lanes, i64 7
  store <8 x double> %v499, ptr %v500, align 64
  %v501 = getelementptr inbounds <8 x double>, ptr %lanes, i64 14
  %v502 = load <8 x double>, ptr %v501, align 64
  %v503 = fmul <8 x double> %v502, splat (double 0x3FE0000000000000)
  %v504 = select <8 x i1> %v429, <8 x double> %v503, <8 x double> %v502
  %v505 = fcmp olt <8 x double> %v424, splat (double 0x7FF0000000000000)
  %v506 = select <8 x i1> %v505, <8 x double> %v504, <8 x double> splat (double 0x3FF0000000000000)
  %v507 = getelementptr inbounds <8 x double>, ptr %lanes, i64 14
  store <8 x double> %v506, ptr %v507, align 64
  %v508 = getelementptr inbounds <8 x double>, ptr %lanes, i64 8
  %v509 = load <8 x double>, ptr %v508, align 64
  %v510 = select <8 x i1> %v429, <8 x double> splat (double 0x3FF0000000000000), <8 x double> splat (double 0x0000000000000000)
  %v511 = fadd <8 x double> %v509, %v510
  %v512 = getelementptr inbounds <8 x double>, ptr %lanes, i64 9
  %v513 = load <8 x double>, ptr %v512, align 64
  %v514 = select <8 x i1> %v485, <8 x double> splat (double 0x3FF0000000000000), <8 x double> splat (double 0x0000000000000000)
  %v515 = fadd <8 x double> %v513, %v514
  %v516 = getelementptr inbounds <8 x double>, ptr %lanes, i64 8
  store <8 x double> %v511, ptr %v516, align 64
  %v517 = getelementptr inbounds <8 x double>, ptr %lanes, i64 9
  store <8 x double> %v515, ptr %v517, align 64
  %v518 = getelementptr inbounds <8 x double>, ptr %lanes, i64 28
  %v519 = load <8 x double>, ptr %v518, align 64
  %v520 = select <8 x i1> %v429, <8 x double> splat (double 0x3FF0000000000000), <8 x double> splat (double 0x0000000000000000)
  %v521 = fadd <8 x double> %v519, %v520
  %v522 = getelementptr inbounds <8 x double>, ptr %lanes, i64 28
  store <8 x double> %v521, ptr %v522, align 64
  ; who needs attention
  %v523 = and <8 x i1> %v429, %v9
  %v524 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v2)
  %v525 = getelementptr inbounds <8 x double>, ptr %settings, i64 2
  %v526 = load <8 x double>, ptr %v525, align 64
  %v527 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3CF0000000000000), <8 x double> %v524, <8 x double> %v526)
  %v528 = fcmp olt <8 x double> %v480, %v527
  %v529 = fadd <8 x double> %v511, %v515
  %v530 = getelementptr inbounds <8 x double>, ptr %settings, i64 1
  %v531 = load <8 x double>, ptr %v530, align 64
  %v532 = fcmp oge <8 x double> %v529, %v531
  %v533 = fcmp ogt <8 x double> %v426, splat (double 0x0000000000000000)
  %v534 = xor <8 x i1> %v523, splat (i1 true)
  %v535 = and <8 x i1> %v533, %v534
  %v536 = or <8 x i1> %v528, %v532
  %v537 = and <8 x i1> %v535, %v536
  %v538 = getelementptr inbounds <8 x double>, ptr %lanes, i64 70
  %v539 = load <8 x double>, ptr %v538, align 64
  %v540 = getelementptr inbounds <8 x double>, ptr %settings, i64 11
  %v541 = load <8 x double>, ptr %v540, align 64
  %v542 = fcmp olt <8 x double> %v539, %v541
  %v543 = or <8 x i1> zeroinitializer, %v542
  %v544 = getelementptr inbounds <8 x double>, ptr %settings, i64 13
  %v545 = load <8 x double>, ptr %v544, align 64
  %v546 = fcmp ogt <8 x double> %v539, %v545
  %v547 = or <8 x i1> %v543, %v546
  %v548 = getelementptr inbounds <8 x double>, ptr %lanes, i64 71
  %v549 = load <8 x double>, ptr %v548, align 64
  %v550 = getelementptr inbounds <8 x double>, ptr %settings, i64 12
  %v551 = load <8 x double>, ptr %v550, align 64
  %v552 = fcmp olt <8 x double> %v549, %v551
  %v553 = or <8 x i1> %v547, %v552
  %v554 = getelementptr inbounds <8 x double>, ptr %settings, i64 14
  %v555 = load <8 x double>, ptr %v554, align 64
  %v556 = fcmp ogt <8 x double> %v549, %v555
  %v557 = or <8 x i1> %v553, %v556
  %v558 = and <8 x i1> %v429, %v557
  %v559 = or <8 x i1> %v537, %v558
  %v560 = getelementptr inbounds <8 x double>, ptr %lanes, i64 3
  %v561 = load <8 x double>, ptr %v560, align 64
  %v562 = fcmp olt <8 x double> %v561, %v15
  %v563 = fcmp ole <8 x double> %v561, %v15
  %v564 = or <8 x i1> %v523, %v559
  %v565 = select <8 x i1> %v564, <8 x i1> %v562, <8 x i1> %v563
  %v566 = and <8 x i1> %v429, %v565
  %v567 = bitcast <8 x i1> %v523 to i8
  %v568 = zext i8 %v567 to i64
  %v569 = bitcast <8 x i1> %v559 to i8
  %v570 = zext i8 %v569 to i64
  br label %loop571
loop571:
  %loop571.i = phi i64 [ 0, %loop411.end ], [ %loop571.next, %loop571 ]
  %loop571.carried = phi <8 x double> [ splat (double 0x0000000000000000), %loop411.end ], [ %v579, %loop571 ]
  %v572 = add i64 %loop571.i, 35
  %v573 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v572
  %v574 = load <8 x double>, ptr %v573, align 64
  %v575 = add i64 %loop571.i, 15
  %v576 = getelementptr inbounds <8 x double>, ptr %settings, i64 %v575
  %v577 = load <8 x double>, ptr %v576, align 64
  %v578 = fmul <8 x double> %v574, %v577
  %v579 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v578, <8 x double> %v578, <8 x double> %loop571.carried)
  %loop571.next = add nuw nsw i64 %loop571.i, 1
  %v580 = icmp ult i64 %loop571.next, 2
  br i1 %v580, label %loop571, label %loop571.end
loop571.end:
  br label %loop581
loop581:
  %loop581.i = phi i64 [ 0, %loop571.end ], [ %loop581.next, %loop581 ]
  %loop581.carried = phi <8 x double> [ splat (double 0x0000000000000000), %loop571.end ], [ %v589, %loop581 ]
  %v582 = add i64 %loop581.i, 82
  %v583 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v582
  %v584 = load <8 x double>, ptr %v583, align 64
  %v585 = add i64 %loop581.i, 15
  %v586 = getelementptr inbounds <8 x double>, ptr %settings, i64 %v585
  %v587 = load <8 x double>, ptr %v586, align 64
  %v588 = fmul <8 x double> %v584, %v587
  %v589 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v588, <8 x double> %v588, <8 x double> %loop581.carried)
  %loop581.next = add nuw nsw i64 %loop581.i, 1
  %v590 = icmp ult i64 %loop581.next, 2
  br i1 %v590, label %loop581, label %loop581.end
loop581.end:
  %v591 = fcmp ogt <8 x double> %v589, splat (double 0x16687E92154EF7AC)
  %v592 = fcmp olt <8 x double> %v589, splat (double 0x6974E718D7D7625A)
  %v593 = and <8 x i1> %v591, %v592
  %v594 = bitcast <8 x double> %v589 to <8 x i64>
  %v595 = lshr <8 x i64> %v594, splat (i64 52)
  %v596 = sub <8 x i64> splat (i64 3069), %v595
  %v597 = lshr <8 x i64> %v596, splat (i64 1)
  %v598 = shl <8 x i64> %v597, splat (i64 52)
  %v599 = bitcast <8 x i64> %v598 to <8 x double>
  br label %loop600
loop600:
  %loop600.i = phi i64 [ 0, %loop581.end ], [ %loop600.next, %loop600 ]
  %loop600.carried = phi i1 [ false, %loop581.end ], [ %loop600.carried, %loop600 ]
  %v601 = add i64 %loop600.i, 82
  %v602 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v601
  %v603 = load <8 x double>, ptr %v602, align 64
  %v604 = add i64 %loop600.i, 17
  %v605 = getelementptr inbounds <8 x double>, ptr %settings, i64 %v604
  %v606 = load <8 x double>, ptr %v605, align 64
  %v607 = fmul <8 x double> splat (double 0x3F50624DD2F1A9FC), %v606
  %v608 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v603, <8 x double> %v599, <8 x double> %v607)
  %v609 = add i64 %loop600.i, 35
  %v610 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v609
  %v611 = load <8 x double>, ptr %v610, align 64
  %v612 = select <8 x i1> %v593, <8 x double> %v608, <8 x double> %v611
  %v613 = add i64 %loop600.i, 35
  %v614 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v613
  store <8 x double> %v612, ptr %v614, align 64
  %loop600.next = add nuw nsw i64 %loop600.i, 1
  %v615 = icmp ult i64 %loop600.next, 2
  br i1 %v615, label %loop600, label %loop600.end
loop600.end:
  %v616 = select <8 x i1> %v593, <8 x double> %v589, <8 x double> splat (double 0x0000000000000000)
  %v617 = fmul <8 x double> %v480, %v480
  %v618 = fmul <8 x double> %v617, %v616
  %v619 = fmul <8 x double> splat (double 0x403F83E21060D45A), %v579
  %v620 = fcmp olt <8 x double> %v618, %v619
  %v621 = getelementptr inbounds <8 x double>, ptr %lanes, i64 32
  %v622 = load <8 x double>, ptr %v621, align 64
  %v623 = getelementptr inbounds <8 x double>, ptr %lanes, i64 30
  %v624 = load <8 x double>, ptr %v623, align 64
  %v625 = fadd <8 x double> %v622, splat (double 0x3FF0000000000000)
  %v626 = fadd <8 x double> %v624, splat (double 0x3FF0000000000000)
  %v627 = select <8 x i1> %v620, <8 x double> %v626, <8 x double> splat (double 0x0000000000000000)
  %v628 = fcmp oge <8 x double> %v627, splat (double 0x4008000000000000)
  %v629 = fcmp oge <8 x double> %v625, splat (double 0x4008000000000000)
  %v630 = and <8 x i1> %v628, %v629
  %v631 = and <8 x i1> %v429, %v630
  %v632 = select <8 x i1> %v429, <8 x double> %v625, <8 x double> %v622
  %v633 = getelementptr inbounds <8 x double>, ptr %lanes, i64 32
  store <8 x double> %v632, ptr %v633, align 64
  %v634 = select <8 x i1> %v631, <8 x double> splat (double 0x0000000000000000), <8 x double> %v627
  %v635 = select <8 x i1> %v429, <8 x double> %v634, <8 x double> %v624
  %v636 = getelementptr inbounds <8 x double>, ptr %lanes, i64 30
  store <8 x double> %v635, ptr %v636, align 64
  %v637 = bitcast <8 x i1> %v631 to i8
  %v638 = icmp ne i8 %v637, 0
  br i1 %v638, label %back, label %stay
back:
  %v639 = getelementptr inbounds <8 x double>, ptr %lanes, i64 31
  %v640 = load <8 x double>, ptr %v639, align 64
  %v641 = getelementptr inbounds <8 x double>, ptr %lanes, i64 33
  %v642 = load <8 x double>, ptr %v641, align 64
  %v643 = getelementptr inbounds <8 x double>, ptr %lanes, i64 34
  %v644 = load <8 x double>, ptr %v643, align 64
  %v645 = fmul <8 x double> %v625, splat (double 0x4003711DC47711DC)
  %v646 = fmul <8 x double> %v645, %v644
  %v647 = fsub <8 x double> %v15, %v642
  %v648 = fcmp ogt <8 x double> %v647, %v646
  %v649 = fmul <8 x double> %v640, splat (double 0x4010000000000000)
  %v650 = select <8 x i1> %v648, <8 x double> splat (double 0x4010000000000000), <8 x double> %v649
  %v651 = select <8 x i1> %v631, <8 x double> %v650, <8 x double> %v640
  %v652 = getelementptr inbounds <8 x double>, ptr %lanes, i64 31
  store <8 x double> %v651, ptr %v652, align 64
  %v653 = fdiv <8 x double> %v579, %v616
  %v654 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v653)
  %v655 = fmul <8 x double> splat (double 0x4007C28F5C28F5C2), %v654
  %v656 = fcmp olt <8 x double> %v655, %v480
  %v657 = select <8 x i1> %v656, <8 x double> %v655, <8 x double> %v480
  %v658 = select <8 x i1> %v631, <8 x double> %v657, <8 x double> %v480
  %v659 = getelementptr inbounds <8 x double>, ptr %lanes, i64 1
  store <8 x double> %v658, ptr %v659, align 64
  br label %stay
stay:
  %v660 = bitcast <8 x i1> %v631 to i8
  %v661 = zext i8 %v660 to i64
  %v662 = shl i64 %v661, 16
  %v663 = bitcast <8 x i1> %v566 to i8
  %v664 = icmp ne i8 %v663, 0
  br i1 %v664, label %curve, label %move
curve:
  br label %loop665
loop665:
  %loop665.i = phi i64 [ 0, %curve ], [ %loop665.next, %loop665 ]
  %loop665.carried = phi i1 [ false, %curve ], [ %loop665.carried, %loop665 ]
  %v666 = add i64 %loop665.i, 22
  %v667 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v666
  %v668 = load <8 x double>, ptr %v667, align 64
  %v669 = add i64 %loop665.i, 92
  %v670 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v669
  %v671 = load <8 x double>, ptr %v670, align 64
  %v672 = fmul <8 x double> splat (double 0x4039F2E3B2083EF4), %v671
  %v673 = add i64 %loop665.i, 94
  %v674 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v673
  %v675 = load <8 x double>, ptr %v674, align 64
  %v676 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC00476BA472ADEDE), <8 x double> %v675, <8 x double> %v672)
  %v677 = add i64 %loop665.i, 96
  %v678 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v677
  %v679 = load <8 x double>, ptr %v678, align 64
  %v680 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4024DE1D0D80FF5A), <8 x double> %v679, <8 x double> %v676)
  %v681 = add i64 %loop665.i, 98
  %v682 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v681
  %v683 = load <8 x double>, ptr %v682, align 64
  %v684 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC002F182B74CF74C), <8 x double> %v683, <8 x double> %v680)
  %v685 = add i64 %loop665.i, 100
  %v686 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v685
  %v687 = load <8 x double>, ptr %v686, align 64
  %v688 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FE0CC60E221D23C), <8 x double> %v687, <8 x double> %v684)
  %v689 = add i64 %loop665.i, 102
  %v690 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v689
  %v691 = load <8 x double>, ptr %v690, align 64
  %v692 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FF1FC598AA7BB58), <8 x double> %v691, <8 x double> %v688)
  %v693 = add i64 %loop665.i, 104
  %v694 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v693
  %v695 = load <8 x double>, ptr %v694, align 64
  %v696 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FDB58AE2BDFA0B4), <8 x double> %v695, <8 x double> %v692)
  %v697 = add i64 %loop665.i, 106
  %v698 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v697
  %v699 = load <8 x double>, ptr %v698, align 64
  %v700 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFC604D2E4930BDE), <8 x double> %v699, <8 x double> %v696)
  %v701 = add i64 %loop665.i, 92
  %v702 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v701
  %v703 = load <8 x double>, ptr %v702, align 64
  %v704 = fmul <8 x double> splat (double 0xC023D4D51FBD5C80), %v703
  %v705 = add i64 %loop665.i, 94
  %v706 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v705
  %v707 = load <8 x double>, ptr %v706, align 64
  %v708 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFEF0200AB25AF60), <8 x double> %v707, <8 x double> %v704)
  %v709 = add i64 %loop665.i, 96
  %v710 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v709
  %v711 = load <8 x double>, ptr %v710, align 64
  %v712 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x400859B5C45A6B00), <8 x double> %v711, <8 x double> %v708)
  %v713 = add i64 %loop665.i, 98
  %v714 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v713
  %v715 = load <8 x double>, ptr %v714, align 64
  %v716 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC0387EC709841298), <8 x double> %v715, <8 x double> %v712)
  %v717 = add i64 %loop665.i, 100
  %v718 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v717
  %v719 = load <8 x double>, ptr %v718, align 64
  %v720 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40342D1766E325B2), <8 x double> %v719, <8 x double> %v716)
  %v721 = add i64 %loop665.i, 102
  %v722 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v721
  %v723 = load <8 x double>, ptr %v722, align 64
  %v724 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x402FF6198A8F21C0), <8 x double> %v723, <8 x double> %v720)
  %v725 = add i64 %loop665.i, 104
  %v726 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v725
  %v727 = load <8 x double>, ptr %v726, align 64
  %v728 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC01B27FA2E69A838), <8 x double> %v727, <8 x double> %v724)
  %v729 = add i64 %loop665.i, 106
  %v730 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v729
  %v731 = load <8 x double>, ptr %v730, align 64
  %v732 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC01AD7481FD30AB4), <8 x double> %v731, <8 x double> %v728)
  %v733 = add i64 %loop665.i, 92
  %v734 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v733
  %v735 = load <8 x double>, ptr %v734, align 64
  %v736 = fmul <8 x double> splat (double 0x4026D6FD99FC1E80), %v735
  %v737 = add i64 %loop665.i, 94
  %v738 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v737
  %v739 = load <8 x double>, ptr %v738, align 64
  %v740 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40071A8D23B231E0), <8 x double> %v739, <8 x double> %v736)
  %v741 = add i64 %loop665.i, 96
  %v742 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v741
  %v743 = load <8 x double>, ptr %v742, align 64
  %v744 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40523AF7E3A6CE08), <8 x double> %v743, <8 x double> %v740)
  %v745 = add i64 %loop665.i, 98
  %v746 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v745
  %v747 = load <8 x double>, ptr %v746, align 64
  %v748 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40540801F0614B04), <8 x double> %v747, <8 x double> %v744)
  %v749 = add i64 %loop665.i, 100
  %v750 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v749
  %v751 = load <8 x double>, ptr %v750, align 64
  %v752 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC04A0953D9533862), <8 x double> %v751, <8 x double> %v748)
  %v753 = add i64 %loop665.i, 102
  %v754 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v753
  %v755 = load <8 x double>, ptr %v754, align 64
  %v756 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC04DE51CA19190BE), <8 x double> %v755, <8 x double> %v752)
  %v757 = add i64 %loop665.i, 104
  %v758 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v757
  %v759 = load <8 x double>, ptr %v758, align 64
  %v760 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFC3F2224CE43D80), <8 x double> %v759, <8 x double> %v756)
  %v761 = add i64 %loop665.i, 106
  %v762 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v761
  %v763 = load <8 x double>, ptr %v762, align 64
  %v764 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4013884801D8A0E3), <8 x double> %v763, <8 x double> %v760)
  %v765 = add i64 %loop665.i, 70
  %v766 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v765
  %v767 = load <8 x double>, ptr %v766, align 64
  %v768 = fsub <8 x double> %v767, %v668
  %v769 = fadd <8 x double> %v732, %v764
  %v770 = fneg <8 x double> %v764
  %v771 = add i64 %loop665.i, 37
  %v772 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v771
  store <8 x double> %v668, ptr %v772, align 64
  %v773 = add i64 %loop665.i, 39
  %v774 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v773
  store <8 x double> %v768, ptr %v774, align 64
  %v775 = add i64 %loop665.i, 41
  %v776 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v775
  store <8 x double> %v700, ptr %v776, align 64
  %v777 = add i64 %loop665.i, 43
  %v778 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v777
  store <8 x double> %v769, ptr %v778, align 64
  %v779 = add i64 %loop665.i, 45
  %v780 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v779
  store <8 x double> %v770, ptr %v780, align 64
  %loop665.next = add nuw nsw i64 %loop665.i, 1
  %v781 = icmp ult i64 %loop665.next, 2
  br i1 %v781, label %loop665, label %loop665.end
loop665.end:
  br label %move
move:
  br label %loop782
loop782:
  %loop782.i = phi i64 [ 0, %move ], [ %loop782.next, %loop782 ]
  %loop782.carried = phi i1 [ false, %move ], [ %loop782.carried, %loop782 ]
  %v783 = add i64 %loop782.i, 70
  %v784 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v783
  %v785 = load <8 x double>, ptr %v784, align 64
  %v786 = add i64 %loop782.i, 22
  %v787 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v786
  %v788 = load <8 x double>, ptr %v787, align 64
  %v789 = select <8 x i1> %v429, <8 x double> %v785, <8 x double> %v788
  %v790 = add i64 %loop782.i, 72
  %v791 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v790
  %v792 = load <8 x double>, ptr %v791, align 64
  %v793 = add i64 %loop782.i, 24
  %v794 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v793
  %v795 = load <8 x double>, ptr %v794, align 64
  %v796 = select <8 x i1> %v429, <8 x double> %v792, <8 x double> %v795
  %v797 = add i64 %loop782.i, 22
  %v798 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v797
  store <8 x double> %v789, ptr %v798, align 64
  %v799 = add i64 %loop782.i, 24
  %v800 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v799
  store <8 x double> %v796, ptr %v800, align 64
  %v801 = add i64 %loop782.i, 22
  %v802 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v801
  store <8 x double> %v789, ptr %v802, align 64
  %v803 = add i64 %loop782.i, 24
  %v804 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v803
  store <8 x double> %v796, ptr %v804, align 64
  %v805 = add i64 %loop782.i, 26
  %v806 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v805
  %v807 = load <8 x double>, ptr %v806, align 64
  %v808 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v789)
  %v809 = fcmp ogt <8 x double> %v807, %v808
  %v810 = select <8 x i1> %v809, <8 x double> %v807, <8 x double> %v808
  %v811 = add i64 %loop782.i, 26
  %v812 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v811
  store <8 x double> %v810, ptr %v812, align 64
  %loop782.next = add nuw nsw i64 %loop782.i, 1
  %v813 = icmp ult i64 %loop782.next, 2
  br i1 %v813, label %loop782, label %loop782.end
loop782.end:
  %v814 = or i64 %v568, %v570
  br i1 %v664, label %observe, label %judge
observe:
  %v815 = bitcast <8 x i1> %v566 to i8
  %v816 = zext i8 %v815 to i64
  %v817 = call i64 @uq_observe(ptr %lanes, ptr %settings, i64 %v816, i64 %v814)
  br label %judge
judge:
  %v818 = phi i64 [ 0, %loop782.end ], [ %v817, %observe ]
  %v819 = trunc i64 %v818 to i8
  %v820 = bitcast i8 %v819 to <8 x i1>
  %v821 = or <8 x i1> %v558, %v820
  %v822 = or <8 x i1> %v537, %v821
  %v823 = bitcast <8 x i1> %v822 to i8
  %v824 = zext i8 %v823 to i64
  %v825 = bitcast <8 x i1> %v822 to i8
  %v826 = icmp ne i8 %v825, 0
  br i1 %v826, label %failure, label %done
failure:
  %v827 = fcmp ogt <8 x double> %v506, splat (double 0x3F50000000000000)
  %v828 = select <8 x i1> %v827, <8 x double> splat (double 0x4008000000000000), <8 x double> splat (double 0x401C000000000000)
  %v829 = fmul <8 x double> %v527, splat (double 0x40C3880000000000)
  %v830 = getelementptr inbounds <8 x double>, ptr %settings, i64 3
  %v831 = load <8 x double>, ptr %v830, align 64
  br label %loop832
loop832:
  %loop832.i = phi i64 [ 0, %failure ], [ %loop832.next, %loop832 ]
  %loop832.carried = phi <8 x i1> [ zeroinitializer, %failure ], [ %v862, %loop832 ]
  %v833 = add i64 %loop832.i, 22
  %v834 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v833
  %v835 = load <8 x double>, ptr %v834, align 64
  %v836 = add i64 %loop832.i, 24
  %v837 = getelementptr inbounds <8 x double>, ptr %lanes, i64 %v836
  %v838 = load <8 x double>, ptr %v837, align 64
  %v839 = fmul <8 x double> %v835, %v838
  %v840 = fcmp ogt <8 x double> %v839, splat (double 0x0000000000000000)
  %v841 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v835)
  %v842 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v838)
  %v843 = fmul <8 x double> %v829, %v842
  %v844 = fcmp ole <8 x double> %v841, %v843
  %v845 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v835)
  %v846 = fcmp ogt <8 x double> %v845, splat (double 0x5F138D352E5096AF)
  %v847 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v835)
  %v848 = fmul <8 x double> %v389, %v847
  %v849 = add i64 %loop832.i, 9
  %v850 = getelementptr inbounds <8 x double>, ptr %settings, i64 %v849
  %v851 = load <8 x double>, ptr %v850, align 64
  %v852 = fmul <8 x double> %v851, splat (double 0x412E848000000000)
  %v853 = fcmp ogt <8 x double> %v848, %v852
  %v854 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v835)
  %v855 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v838)
  %v856 = fmul <8 x double> %v831, %v855
  %v857 = fcmp ole <8 x double> %v854, %v856
  %v858 = and <8 x i1> %v853, %v857
  %v859 = or <8 x i1> %v844, %v846
  %v860 = or <8 x i1> %v859, %v858
  %v861 = and <8 x i1> %v840, %v860
  %v862 = or <8 x i1> %loop832.carried, %v861
  %loop832.next = add nuw nsw i64 %loop832.i, 1
  %v863 = icmp ult i64 %loop832.next, 2
  br i1 %v863, label %loop832, label %loop832.end
loop832.end:
  %v864 = select <8 x i1> %v862, <8 x double> splat (double 0x4010000000000000), <8 x double> %v828
  %v865 = select <8 x i1> %v528, <8 x double> %v864, <8 x double> splat (double 0x4014000000000000)
  %v866 = select <8 x i1> %v821, <8 x double> splat (double 0x4000000000000000), <8 x double> %v865
  %v867 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  store <8 x double> %v866, ptr %v867, align 64
  br label %done
done:
  %v868 = shl i64 %v824, 8
  %v869 = or i64 %v568, %v868
  %v870 = or i64 %v869, %v662
  ret i64 %v870
}

define i64 @uq_observe(ptr noalias %lanes, ptr noalias readonly %settings, i64 %due, i64 %strict) #0 {
entry:
  %v1 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = trunc i64 %due to i8
  %v4 = bitcast i8 %v3 to <8 x i1>
  %v5 = trunc i64 %strict to i8
  %v6 = bitcast i8 %v5 to <8 x i1>
  %v7 = getelementptr inbounds <8 x double>, ptr %lanes, i64 3
  %v8 = load <8 x double>, ptr %v7, align 64
  %v9 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 15
  %v10 = load <8 x i64>, ptr %v9, align 64
  %v11 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 16
  %v12 = load <8 x i64>, ptr %v11, align 64
  %v13 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 17
  %v14 = load <8 x i64>, ptr %v13, align 64
  br label %next
next:
  %due.now = phi <8 x i1> [ %v4, %entry ], [ %due.then, %values ]
  %at.now = phi <8 x double> [ %v8, %entry ], [ %at.then, %values ]
  %clock.now = phi <8 x i64> [ %v10, %entry ], [ %clock.then, %values ]
  %place.now = phi <8 x i64> [ %v12, %entry ], [ %place.then, %values ]
  %truth_place.now = phi <8 x i64> [ %v14, %entry ], [ %truth_place.then, %values ]
  %strayed.now = phi <8 x i1> [ zeroinitializer, %entry ], [ %strayed.then, %values ]
  %v15 = getelementptr inbounds <8 x double>, ptr %settings, i64 5
  %v16 = load <8 x double>, ptr %v15, align 64
  %v17 = fcmp ogt <8 x double> %v16, splat (double 0x0000000000000000)
  %v18 = bitcast <8 x i1> %v17 to i8
  %v19 = icmp ne i8 %v18, 0
  br i1 %v19, label %judge, label %values
judge:
  %v20 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  %v21 = load <8 x double>, ptr %v20, align 64
  %v22 = fsub <8 x double> %at.now, %v21
  %v23 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  %v24 = load <8 x double>, ptr %v23, align 64
  %v25 = fdiv <8 x double> %v22, %v24
  %v26 = fsub <8 x double> splat (double 0x3FF0000000000000), %v25
  %v27 = fcmp oge <8 x double> %at.now, %v2
  %v28 = getelementptr inbounds <8 x double>, ptr %lanes, i64 45
  %v29 = load <8 x double>, ptr %v28, align 64
  %v30 = getelementptr inbounds <8 x double>, ptr %lanes, i64 43
  %v31 = load <8 x double>, ptr %v30, align 64
  %v32 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v26, <8 x double> %v29, <8 x double> %v31)
  %v33 = getelementptr inbounds <8 x double>, ptr %lanes, i64 41
  %v34 = load <8 x double>, ptr %v33, align 64
  %v35 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v25, <8 x double> %v32, <8 x double> %v34)
  %v36 = getelementptr inbounds <8 x double>, ptr %lanes, i64 39
  %v37 = load <8 x double>, ptr %v36, align 64
  %v38 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v26, <8 x double> %v35, <8 x double> %v37)
  %v39 = getelementptr inbounds <8 x double>, ptr %lanes, i64 37
  %v40 = load <8 x double>, ptr %v39, align 64
  %v41 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v25, <8 x double> %v38, <8 x double> %v40)
  %v42 = getelementptr inbounds <8 x double>, ptr %lanes, i64 22
  %v43 = load <8 x double>, ptr %v42, align 64
  %v44 = select <8 x i1> %v27, <8 x double> %v43, <8 x double> %v41
  %v45 = getelementptr inbounds <8 x double>, ptr %settings, i64 11
  %v46 = load <8 x double>, ptr %v45, align 64
  %v47 = fcmp olt <8 x double> %v44, %v46
  %v48 = or <8 x i1> zeroinitializer, %v47
  %v49 = getelementptr inbounds <8 x double>, ptr %settings, i64 13
  %v50 = load <8 x double>, ptr %v49, align 64
  %v51 = fcmp ogt <8 x double> %v44, %v50
  %v52 = or <8 x i1> %v48, %v51
  %v53 = getelementptr inbounds <8 x double>, ptr %lanes, i64 46
  %v54 = load <8 x double>, ptr %v53, align 64
  %v55 = getelementptr inbounds <8 x double>, ptr %lanes, i64 44
  %v56 = load <8 x double>, ptr %v55, align 64
  %v57 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v26, <8 x double> %v54, <8 x double> %v56)
  %v58 = getelementptr inbounds <8 x double>, ptr %lanes, i64 42
  %v59 = load <8 x double>, ptr %v58, align 64
  %v60 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v25, <8 x double> %v57, <8 x double> %v59)
  %v61 = getelementptr inbounds <8 x double>, ptr %lanes, i64 40
  %v62 = load <8 x double>, ptr %v61, align 64
  %v63 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v26, <8 x double> %v60, <8 x double> %v62)
  %v64 = getelementptr inbounds <8 x double>, ptr %lanes, i64 38
  %v65 = load <8 x double>, ptr %v64, align 64
  %v66 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v25, <8 x double> %v63, <8 x double> %v65)
  %v67 = getelementptr inbounds <8 x double>, ptr %lanes, i64 23
  %v68 = load <8 x double>, ptr %v67, align 64
  %v69 = select <8 x i1> %v27, <8 x double> %v68, <8 x double> %v66
  %v70 = getelementptr inbounds <8 x double>, ptr %settings, i64 12
  %v71 = load <8 x double>, ptr %v70, align 64
  %v72 = fcmp olt <8 x double> %v69, %v71
  %v73 = or <8 x i1> %v52, %v72
  %v74 = getelementptr inbounds <8 x double>, ptr %settings, i64 14
  %v75 = load <8 x double>, ptr %v74, align 64
  %v76 = fcmp ogt <8 x double> %v69, %v75
  %v77 = or <8 x i1> %v73, %v76
  %v78 = and <8 x i1> %due.now, %v77
  %v79 = xor <8 x i1> %v78, splat (i1 true)
  %v80 = and <8 x i1> %due.now, %v79
  %v81 = or <8 x i1> %strayed.now, %v78
  br label %values
values:
  %due.good = phi <8 x i1> [ %due.now, %next ], [ %v80, %judge ]
  %strayed.then = phi <8 x i1> [ %strayed.now, %next ], [ %v81, %judge ]
  %v82 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  %v83 = load <8 x double>, ptr %v82, align 64
  %v84 = fsub <8 x double> %at.now, %v83
  %v85 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  %v86 = load <8 x double>, ptr %v85, align 64
  %v87 = fdiv <8 x double> %v84, %v86
  %v88 = fsub <8 x double> splat (double 0x3FF0000000000000), %v87
  %v89 = fcmp oge <8 x double> %at.now, %v2
  %v90 = getelementptr inbounds <8 x double>, ptr %lanes, i64 45
  %v91 = load <8 x double>, ptr %v90, align 64
  %v92 = getelementptr inbounds <8 x double>, ptr %lanes, i64 43
  %v93 = load <8 x double>, ptr %v92, align 64
  %v94 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v88, <8 x double> %v91, <8 x double> %v93)
  %v95 = getelementptr inbounds <8 x double>, ptr %lanes, i64 41
  %v96 = load <8 x double>, ptr %v95, align 64
  %v97 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v87, <8 x double> %v94, <8 x double> %v96)
  %v98 = getelementptr inbounds <8 x double>, ptr %lanes, i64 39
  %v99 = load <8 x double>, ptr %v98, align 64
  %v100 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v88, <8 x double> %v97, <8 x double> %v99)
  %v101 = getelementptr inbounds <8 x double>, ptr %lanes, i64 37
  %v102 = load <8 x double>, ptr %v101, align 64
  %v103 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v87, <8 x double> %v100, <8 x double> %v102)
  %v104 = getelementptr inbounds <8 x double>, ptr %lanes, i64 22
  %v105 = load <8 x double>, ptr %v104, align 64
  %v106 = select <8 x i1> %v89, <8 x double> %v105, <8 x double> %v103
  %v107 = getelementptr inbounds <8 x double>, ptr %lanes, i64 46
  %v108 = load <8 x double>, ptr %v107, align 64
  %v109 = getelementptr inbounds <8 x double>, ptr %lanes, i64 44
  %v110 = load <8 x double>, ptr %v109, align 64
  %v111 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v88, <8 x double> %v108, <8 x double> %v110)
  %v112 = getelementptr inbounds <8 x double>, ptr %lanes, i64 42
  %v113 = load <8 x double>, ptr %v112, align 64
  %v114 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v87, <8 x double> %v111, <8 x double> %v113)
  %v115 = getelementptr inbounds <8 x double>, ptr %lanes, i64 40
  %v116 = load <8 x double>, ptr %v115, align 64
  %v117 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v88, <8 x double> %v114, <8 x double> %v116)
  %v118 = getelementptr inbounds <8 x double>, ptr %lanes, i64 38
  %v119 = load <8 x double>, ptr %v118, align 64
  %v120 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v87, <8 x double> %v117, <8 x double> %v119)
  %v121 = getelementptr inbounds <8 x double>, ptr %lanes, i64 23
  %v122 = load <8 x double>, ptr %v121, align 64
  %v123 = select <8 x i1> %v89, <8 x double> %v122, <8 x double> %v120
  %v124 = getelementptr inbounds <8 x i64>, ptr %settings, i64 8
  %v125 = load <8 x i64>, ptr %v124, align 64
  %v126 = getelementptr inbounds <8 x i64>, ptr %settings, i64 7
  %v127 = load <8 x i64>, ptr %v126, align 64
  %v128 = getelementptr inbounds <8 x i64>, ptr %settings, i64 6
  %v129 = load <8 x i64>, ptr %v128, align 64
  %v130 = select <8 x i1> %due.good, <8 x i64> %place.now, <8 x i64> %v125
  %v131 = extractelement <8 x i64> %v130, i64 0
  %v132 = extractelement <8 x i64> %v130, i64 1
  %v133 = extractelement <8 x i64> %v130, i64 2
  %v134 = extractelement <8 x i64> %v130, i64 3
  %v135 = extractelement <8 x i64> %v130, i64 4
  %v136 = extractelement <8 x i64> %v130, i64 5
  %v137 = extractelement <8 x i64> %v130, i64 6
  %v138 = extractelement <8 x i64> %v130, i64 7
  %v139 = inttoptr i64 %v131 to ptr
  %v140 = inttoptr i64 %v132 to ptr
  %v141 = inttoptr i64 %v133 to ptr
  %v142 = inttoptr i64 %v134 to ptr
  %v143 = inttoptr i64 %v135 to ptr
  %v144 = inttoptr i64 %v136 to ptr
  %v145 = inttoptr i64 %v137 to ptr
  %v146 = inttoptr i64 %v138 to ptr
  %v147 = extractelement <8 x double> %v106, i64 0
  store double %v147, ptr %v139, align 8
  %v148 = extractelement <8 x double> %v106, i64 1
  store double %v148, ptr %v140, align 8
  %v149 = extractelement <8 x double> %v106, i64 2
  store double %v149, ptr %v141, align 8
  %v150 = extractelement <8 x double> %v106, i64 3
  store double %v150, ptr %v142, align 8
  %v151 = extractelement <8 x double> %v106, i64 4
  store double %v151, ptr %v143, align 8
  %v152 = extractelement <8 x double> %v106, i64 5
  store double %v152, ptr %v144, align 8
  %v153 = extractelement <8 x double> %v106, i64 6
  store double %v153, ptr %v145, align 8
  %v154 = extractelement <8 x double> %v106, i64 7
  store double %v154, ptr %v146, align 8
  %v155 = add <8 x i64> %place.now, %v129
  %v156 = select <8 x i1> %due.good, <8 x i64> %v155, <8 x i64> %v125
  %v157 = extractelement <8 x i64> %v156, i64 0
  %v158 = extractelement <8 x i64> %v156, i64 1
  %v159 = extractelement <8 x i64> %v156, i64 2
  %v160 = extractelement <8 x i64> %v156, i64 3
  %v161 = extractelement <8 x i64> %v156, i64 4
  %v162 = extractelement <8 x i64> %v156, i64 5
  %v163 = extractelement <8 x i64> %v156, i64 6
  %v164 = extractelement <8 x i64> %v156, i64 7
  %v165 = inttoptr i64 %v157 to ptr
  %v166 = inttoptr i64 %v158 to ptr
  %v167 = inttoptr i64 %v159 to ptr
  %v168 = inttoptr i64 %v160 to ptr
  %v169 = inttoptr i64 %v161 to ptr
  %v170 = inttoptr i64 %v162 to ptr
  %v171 = inttoptr i64 %v163 to ptr
  %v172 = inttoptr i64 %v164 to ptr
  %v173 = extractelement <8 x double> %v123, i64 0
  store double %v173, ptr %v165, align 8
  %v174 = extractelement <8 x double> %v123, i64 1
  store double %v174, ptr %v166, align 8
  %v175 = extractelement <8 x double> %v123, i64 2
  store double %v175, ptr %v167, align 8
  %v176 = extractelement <8 x double> %v123, i64 3
  store double %v176, ptr %v168, align 8
  %v177 = extractelement <8 x double> %v123, i64 4
  store double %v177, ptr %v169, align 8
  %v178 = extractelement <8 x double> %v123, i64 5
  store double %v178, ptr %v170, align 8
  %v179 = extractelement <8 x double> %v123, i64 6
  store double %v179, ptr %v171, align 8
  %v180 = extractelement <8 x double> %v123, i64 7
  store double %v180, ptr %v172, align 8
  %v181 = add <8 x i64> %v155, %v129
  %v182 = select <8 x i1> %due.good, <8 x i64> splat (i64 8), <8 x i64> zeroinitializer
  %clock.then = add <8 x i64> %clock.now, %v182
  %place.then = add <8 x i64> %place.now, %v182
  %v183 = select <8 x i1> %due.good, <8 x i64> splat (i64 1), <8 x i64> zeroinitializer
  %truth_place.then = add <8 x i64> %truth_place.now, %v183
  %v184 = extractelement <8 x i64> %clock.then, i64 0
  %v185 = extractelement <8 x i64> %clock.then, i64 1
  %v186 = extractelement <8 x i64> %clock.then, i64 2
  %v187 = extractelement <8 x i64> %clock.then, i64 3
  %v188 = extractelement <8 x i64> %clock.then, i64 4
  %v189 = extractelement <8 x i64> %clock.then, i64 5
  %v190 = extractelement <8 x i64> %clock.then, i64 6
  %v191 = extractelement <8 x i64> %clock.then, i64 7
  %v192 = inttoptr i64 %v184 to ptr
  %v193 = inttoptr i64 %v185 to ptr
  %v194 = inttoptr i64 %v186 to ptr
  %v195 = inttoptr i64 %v187 to ptr
  %v196 = inttoptr i64 %v188 to ptr
  %v197 = inttoptr i64 %v189 to ptr
  %v198 = inttoptr i64 %v190 to ptr
  %v199 = inttoptr i64 %v191 to ptr
  %v200 = load double, ptr %v192, align 8
  %v201 = insertelement <8 x double> poison, double %v200, i64 0
  %v202 = load double, ptr %v193, align 8
  %v203 = insertelement <8 x double> %v201, double %v202, i64 1
  %v204 = load double, ptr %v194, align 8
  %v205 = insertelement <8 x double> %v203, double %v204, i64 2
  %v206 = load double, ptr %v195, align 8
  %v207 = insertelement <8 x double> %v205, double %v206, i64 3
  %v208 = load double, ptr %v196, align 8
  %v209 = insertelement <8 x double> %v207, double %v208, i64 4
  %v210 = load double, ptr %v197, align 8
  %v211 = insertelement <8 x double> %v209, double %v210, i64 5
  %v212 = load double, ptr %v198, align 8
  %v213 = insertelement <8 x double> %v211, double %v212, i64 6
  %v214 = load double, ptr %v199, align 8
  %v215 = insertelement <8 x double> %v213, double %v214, i64 7
  %at.then = select <8 x i1> %due.good, <8 x double> %v215, <8 x double> %at.now
  %v216 = fcmp olt <8 x double> %at.then, %v2
  %v217 = fcmp ole <8 x double> %at.then, %v2
  %v218 = select <8 x i1> %v6, <8 x i1> %v216, <8 x i1> %v217
  %due.then = and <8 x i1> %due.good, %v218
  %v219 = bitcast <8 x i1> %due.then to i8
  %v220 = icmp ne i8 %v219, 0
  br i1 %v220, label %next, label %done
done:
  %v221 = getelementptr inbounds <8 x double>, ptr %lanes, i64 3
  store <8 x double> %at.then, ptr %v221, align 64
  %v222 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 15
  store <8 x i64> %clock.then, ptr %v222, align 64
  %v223 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 16
  store <8 x i64> %place.then, ptr %v223, align 64
  %v224 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 17
  store <8 x i64> %truth_place.then, ptr %v224, align 64
  %v225 = select <8 x i1> %strayed.then, <8 x double> %at.then, <8 x double> %v2
  %v226 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  store <8 x double> %v225, ptr %v226, align 64
  %v227 = bitcast <8 x i1> %strayed.then to i8
  %v228 = zext i8 %v227 to i64
  ret i64 %v228
}

define void @uq_outcomes(ptr noalias readonly %given, ptr noalias %taken, i64 %groups) #0 {
entry:
  %some = icmp sgt i64 %groups, 0
  br i1 %some, label %group, label %done
group:
  %g = phi i64 [ 0, %entry ], [ %next, %group ]
  %in = mul i64 %g, 1
  %out = mul i64 %g, 0
  %from = getelementptr inbounds <8 x double>, ptr %given, i64 %in
  %to = getelementptr inbounds <8 x double>, ptr %taken, i64 %out

  %next = add i64 %g, 1
  %more = icmp slt i64 %next, %groups
  br i1 %more, label %group, label %done
done:
  ret void
}

define void @uq_starts(ptr noalias readonly %given, ptr noalias %taken, i64 %groups) #0 {
entry:
  %some = icmp sgt i64 %groups, 0
  br i1 %some, label %group, label %done
group:
  %g = phi i64 [ 0, %entry ], [ %next, %group ]
  %in = mul i64 %g, 1
  %out = mul i64 %g, 2
  %from = getelementptr inbounds <8 x double>, ptr %given, i64 %in
  %to = getelementptr inbounds <8 x double>, ptr %taken, i64 %out
  %v1 = getelementptr inbounds <8 x double>, ptr %from, i64 0
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = fmul <8 x double> %v2, splat (double 0x0000000000000000)
  %v4 = getelementptr inbounds <8 x double>, ptr %to, i64 0
  store <8 x double> %v3, ptr %v4, align 64
  %v5 = getelementptr inbounds <8 x double>, ptr %to, i64 1
  store <8 x double> %v3, ptr %v5, align 64
  %next = add i64 %g, 1
  %more = icmp slt i64 %next, %groups
  br i1 %more, label %group, label %done
done:
  ret void
}

declare <8 x double> @llvm.fabs.v8f64(<8 x double>)
declare <8 x double> @llvm.fma.v8f64(<8 x double>, <8 x double>, <8 x double>)
declare <8 x double> @llvm.sqrt.v8f64(<8 x double>)

attributes #0 = { nounwind }
attributes #1 = { nounwind alignstack=64 }
